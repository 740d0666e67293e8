/** Profiles for the animation, from dense output: equal times plus the stage edges, laid before the first step. */
import { equalTimes, FACES, type Frames, type LaidCycle } from '../model';
import type { FieldPoints } from '../stepping';
import { Instants } from './histories';
import type { Quarters } from './quarters';

/** At most so many frames, stage edges included. */
export const MAX_FRAMES = 600;

export class FrameRecorder {
  private readonly points: FieldPoints;
  private readonly times: Float64Array;
  private readonly instants: Instants;
  private readonly temperature: Float32Array;
  private readonly flux: Float32Array;
  private readonly profile: Float64Array;
  private taken = 0;

  constructor(points: FieldPoints, cycle: LaidCycle) {
    const count = points.position.length;
    this.points = points;
    this.times = equalTimes(cycle, MAX_FRAMES - cycle.stages.length);
    this.instants = new Instants(this.times);
    this.temperature = new Float32Array(this.times.length * count);
    this.flux = new Float32Array(this.times.length * FACES.length);
    this.profile = new Float64Array(count);
  }

  observe(quarters: Quarters): void {
    const { step } = quarters;
    for (const { fraction } of this.instants.upTo('at', quarters)) {
      step.at(fraction, this.profile);
      this.temperature.set(this.profile, this.taken * this.profile.length);
      FACES.forEach((face, i) => (this.flux[this.taken * FACES.length + i] = step.faceFluxAt(face, fraction)));
      this.taken++;
    }
  }

  /** The frames taken so far; every array has a buffer of its own. */
  frames(): Frames {
    const { taken, points, profile } = this;
    return {
      time_s: this.times.slice(0, taken),
      position_m: points.position.slice(),
      layerStart: points.layerStart.slice(),
      temperature_C: this.temperature.slice(0, taken * profile.length),
      faceFlux_W_m2: this.flux.slice(0, taken * FACES.length),
    };
  }
}
