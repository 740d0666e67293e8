/** The section at the playhead: everything in it that moves, worked out once a frame for all that show it. */
import { computed, type ComputedRef } from 'vue';
import type { Frames, LaidCycle, Project } from '../../solver/model';
import type { QuantityKind } from '../../solver/model/quantities';
import { faceFluxAt, fluxProfile, profileAt, type Box } from '../draw';
import { useViewStore } from '../stores';
import { bracketOf, type Bracket } from './bracket';
import type { SectionGeometry } from './geometry';
import { conductivities } from './profilePath';
import { sidesAt, type Side } from './sides';
import type { StageEndName, StageEndProfile } from './stageEnds';

/** What the section is drawn from; reactive. */
export interface SectionInput {
  plan: Project;
  /** The plan that the frames are of. */
  solved: Project;
  laid: LaidCycle;
  frames: Frames;
  /** Pixel across of every point of the frames. */
  across: Float64Array;
  geometry: SectionGeometry;
  kind: QuantityKind;
  ghosts: readonly StageEndProfile[];
}

export interface Moment {
  /** Temperature at every point of the frames, °C. */
  profile: ComputedRef<Float64Array>;
  /** Into the part at both faces, W/m². */
  faceFlux: ComputedRef<[number, number]>;
  /** Heat flow through the part: pixels across, W/m². */
  flux: ComputedRef<{ x: number[]; values: number[] }>;
  sides: ComputedRef<Side[]>;
  bracket: ComputedRef<Bracket | null>;
  /** Names of the profiles at stage ends that are clear of the profile of now. */
  names: ComputedRef<StageEndName[]>;
  /** What read-outs keep clear of. */
  taken: ComputedRef<Box[]>;
}

/** Names of earlier profiles nearer than this to the profile of now step back, px. */
const CLEAR = 13;
/** Width of the boxes that stand for the profile, px. */
const PIECE = 10;

export function useMoment(input: Readonly<SectionInput>): Moment {
  const view = useViewStore();
  const profile = computed(() => profileAt(input.frames, view.time));
  const faceFlux = computed(() => faceFluxAt(input.frames, view.time));
  const conductivity = computed(() => conductivities(input.solved));
  const flux = computed(() => {
    const { layer, fraction, flux: values } = fluxProfile(input.frames, profile.value, conductivity.value, faceFlux.value);
    return { x: layer.map((index, i) => input.geometry.row.inLayer(index, fraction[i])), values };
  });
  const sides = computed(() => sidesAt(input.plan, input.laid, view.time));
  const bracket = computed(() => {
    if (input.kind !== 'temperature') return null;
    return bracketOf(input.solved, input.frames, input.across, profile.value, input.geometry.axis.scale, view.units);
  });
  const curve = computed(() => (input.kind === 'temperature' ? boxesAlong(input, profile.value) : []));
  const names = computed<StageEndName[]>((before) => {
    const clear = input.ghosts.flatMap(({ name }) => (name === null || covered(name.box, curve.value) ? [] : [name]));
    // The same names are the same list: nothing is drawn anew for them.
    const same = before?.length === clear.length && clear.every((name, i) => name === before[i]);
    return same && before !== undefined ? before : clear;
  });
  const taken = computed(() => [...curve.value, ...names.value.map(({ box }) => box), ...(bracket.value?.boxes ?? [])]);
  return { profile, faceFlux, flux, sides, bracket, names, taken };
}

/** Boxes along the profile, so that no words cover it. */
function boxesAlong({ across, geometry }: Readonly<SectionInput>, profile: Float64Array): Box[] {
  const boxes: Box[] = [];
  let last = -Infinity;
  for (let i = 0; i < across.length; i++) {
    if (across[i] - last < PIECE) continue;
    last = across[i];
    boxes.push({ x: last - PIECE / 2, y: geometry.axis.scale.at(profile[i]) - 2, width: PIECE, height: 4 });
  }
  return boxes;
}

const covered = ({ x, y, width }: Box, curve: readonly Box[]): boolean =>
  curve.some((box) => box.x > x - PIECE && box.x < x + width && Math.abs(box.y - y - 5) < CLEAR);
