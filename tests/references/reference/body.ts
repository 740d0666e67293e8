/**
 * Heat balances of a chain of control volumes: V dE/dt = flow in − flow out + V p; a node of no volume balances at once.
 *
 * The unknown y of a node is its temperature, or its heat content where the material takes up latent heat.
 */
import type { LaidStage } from '../../../solver/model';
import type { Chain } from './chain';
import { contactFlux, faceLawAt, powerAt, type FaceLaw, type Side } from './laws';
import { kineticsOf, stateAfter, type Kinetics } from './reaction';

/** What the balances are taken at. */
export interface Instant {
  readonly stage: LaidStage;
  readonly time: number;
  readonly side: Side;
}

export class Body {
  readonly chain: Chain;
  readonly nodes: number;
  /** At the unknowns last read: temperature and its slope over y; heat content, J/m³, and its slope over y. */
  readonly temperature: Float64Array;
  readonly temperatureSlope: Float64Array;
  readonly heat: Float64Array;
  readonly heatSlope: Float64Array;
  /** Balance of every node, W, and its derivatives over y of the node before, of itself and of the node after. */
  readonly balance: Float64Array;
  readonly lower: Float64Array;
  readonly diagonal: Float64Array;
  readonly upper: Float64Array;
  /** Kinetics of the cells that react; null elsewhere. */
  readonly kinetics: readonly (Kinetics | null)[];
  private readonly heldInY: readonly boolean[];

  constructor(chain: Chain) {
    const nodes = chain.depth.length;
    const array = (): Float64Array => new Float64Array(nodes);
    this.chain = chain;
    this.nodes = nodes;
    [this.temperature, this.temperatureSlope, this.heat, this.heatSlope] = [array(), array(), array(), array()];
    [this.balance, this.lower, this.diagonal, this.upper] = [array(), array(), array(), array()];
    const kinetics = chain.substances.map(({ material }) =>
      material.reaction === undefined ? null : kineticsOf(material.reaction),
    );
    this.kinetics = Array.from(chain.layer, (layer, node) => (chain.volume[node] > 0 ? kinetics[layer] : null));
    this.heldInY = Array.from(chain.layer, (layer, node) => chain.volume[node] > 0 && chain.substances[layer].latent);
  }

  /** The unknowns of a field of temperatures. */
  unknownsOf(temperature: ArrayLike<number>): Float64Array {
    const { layer, substances } = this.chain;
    return Float64Array.from({ length: this.nodes }, (_, i) =>
      this.heldInY[i] ? substances[layer[i]].heatAt(temperature[i]).heat : temperature[i],
    );
  }

  read(y: Float64Array): void {
    const { layer, substances, volume } = this.chain;
    for (let i = 0; i < this.nodes; i++) {
      const substance = substances[layer[i]];
      if (this.heldInY[i]) {
        substance.readHeat(y[i]);
        this.temperature[i] = substance.temperature;
        this.temperatureSlope[i] = substance.slope;
        this.heat[i] = y[i];
        this.heatSlope[i] = 1;
      } else {
        this.temperature[i] = y[i];
        this.temperatureSlope[i] = 1;
        if (volume[i] === 0) continue;
        const { heat, capacity } = substance.heatAt(y[i]);
        this.heat[i] = heat;
        this.heatSlope[i] = capacity;
      }
    }
  }

  /** Balances without reactions, at the unknowns last read. */
  assemble(instant: Instant): void {
    const { balance, lower, diagonal, upper } = this;
    for (const array of [balance, lower, diagonal, upper]) array.fill(0);
    this.addLinks();
    this.addSources(instant);
    if (!this.chain.solid) this.addFace(0, 'start', this.chain.area[0], instant);
    this.addFace(this.nodes - 1, 'end', this.chain.area[1], instant);
  }

  private addLinks(): void {
    const { temperature, temperatureSlope, balance, lower, diagonal, upper } = this;
    const { links } = this.chain;
    for (let i = 0; i < links.length; i++) {
      const link = links[i];
      let flow: number, bySelf: number, byNext: number;
      if ('substance' in link) {
        const { conductivity } = link.substance;
        conductivity.read(temperature[i]);
        flow = link.shape * conductivity.integral;
        bySelf = link.shape * conductivity.value;
        conductivity.read(temperature[i + 1]);
        flow -= link.shape * conductivity.integral;
        byNext = -link.shape * conductivity.value;
      } else {
        const { flux, slopes } = contactFlux(link.contact, temperature[i], temperature[i + 1]);
        [flow, bySelf, byNext] = [link.area * flux, link.area * slopes[0], link.area * slopes[1]];
      }
      balance[i] -= flow;
      balance[i + 1] += flow;
      diagonal[i] -= bySelf * temperatureSlope[i];
      upper[i] -= byNext * temperatureSlope[i + 1];
      lower[i + 1] += bySelf * temperatureSlope[i];
      diagonal[i + 1] += byNext * temperatureSlope[i + 1];
    }
  }

  private addSources({ stage, time, side }: Instant): void {
    const { temperature, temperatureSlope, balance, diagonal } = this;
    const { layer, volume, depth } = this.chain;
    for (const source of stage.sources) {
      const power = powerAt(source, time, side);
      for (let i = 0; i < this.nodes; i++) {
        if (layer[i] !== source.layer || volume[i] === 0) continue;
        const by = 1e-3;
        const now = power(temperature[i], depth[i]);
        balance[i] += volume[i] * now;
        diagonal[i] += (volume[i] * (power(temperature[i] + by, depth[i]) - now) * temperatureSlope[i]) / by;
      }
    }
  }

  private addFace(node: number, face: 'start' | 'end', area: number, { stage, time, side }: Instant): void {
    const law = faceLawAt(stage.exposures[face], time, side);
    if (typeof law === 'number') {
      this.balance[node] = law - this.temperature[node];
      this.lower[node] = this.upper[node] = 0;
      this.diagonal[node] = -1;
      return;
    }
    const { flux, slope } = law(this.temperature[node]);
    this.balance[node] += area * flux;
    this.diagonal[node] += area * slope;
  }

  /**
   * Adds the heat of reactions whose states solve r = known + weight × r', and its derivative; leaves the states and their
   * rates in `states` and `rates`.
   */
  addReactions(known: Float64Array, weight: number, states: Float64Array, rates: Float64Array): void {
    const { kinetics, temperature, temperatureSlope, balance, diagonal } = this;
    const { volume, layer, substances } = this.chain;
    for (let i = 0; i < this.nodes; i++) {
      const own = kinetics[i];
      if (own === null) continue;
      const speedAt = (at: number): number => own.speed(stateAfter(own, known[i], weight, at), at);
      const by = 1e-3;
      states[i] = stateAfter(own, known[i], weight, temperature[i]);
      rates[i] = own.rate(states[i], temperature[i]);
      const full = volume[i] * substances[layer[i]].density * own.heat;
      const speed = own.speed(states[i], temperature[i]);
      balance[i] += full * speed;
      diagonal[i] += (full * (speedAt(temperature[i] + by) - speed) * temperatureSlope[i]) / by;
    }
  }

  /** Change over time of what the faces impose, at the temperatures last read, W/s (K/s for a held face): start, end. */
  faceDrift({ stage, time, side }: Instant, by: number): [number, number] {
    const other: Instant = { stage, time: side === 'after' ? time + by : time - by, side };
    const valueOf = (law: FaceLaw | number, node: number, area: number): number =>
      typeof law === 'number' ? law : area * law(this.temperature[node]).flux;
    const drift = (face: 'start' | 'end', node: number, area: number): number => {
      const exposure = stage.exposures[face];
      const now = valueOf(faceLawAt(exposure, time, side), node, area);
      return (valueOf(faceLawAt(exposure, other.time, side), node, area) - now) / (other.time - time);
    };
    return [this.chain.solid ? 0 : drift('start', 0, this.chain.area[0]), drift('end', this.nodes - 1, this.chain.area[1])];
  }
}
