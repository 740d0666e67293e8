/** A material as the reference reads it: heat content and integral of conductivity over temperature, and back. */
import type { Curve, Material } from '../../../solver/model';
import { readExpression } from '../../../solver/model/expressions';
import { Pieces } from './pieces';

/** Pieces into which an expression is cut over the range of temperatures of the plan. */
const EXPRESSION_PIECES = 400;

type Property = (temperature: number) => number;

/** A jump of heat content at one temperature, J/m³. */
interface Jump {
  readonly temperature: number;
  readonly heat: number;
}

export class Substance {
  readonly material: Material;
  /** Conductivity and its integral. */
  readonly conductivity: Pieces;
  /** True where heat content is the unknown of a cell: the material takes up latent heat. */
  readonly latent: boolean;
  /** Density at 20 °C, kg/m³. */
  readonly density: number;
  private readonly capacity: Pieces;
  private readonly jumps: readonly Jump[];
  /** Temperature, and its slope over heat content, at the heat content last read. */
  temperature = 0;
  slope = 0;

  /** `range`: lowest and highest temperature for which expressions are asked, °C. */
  constructor(material: Material, range: readonly [number, number]) {
    this.material = material;
    const changes = material.latent ?? [];
    this.latent = changes.length > 0;
    this.conductivity = new Pieces(endsOf([material.conductivity], [], range), property(material.conductivity));
    const [density, specific] = [property(material.density), property(material.heatCapacity)];
    this.density = density(20);
    const spread = changes.filter(({ from, to }) => to > from);
    const corners = spread.flatMap(({ from, to }) => [from, to]);
    const inChange = (temperature: number): number =>
      spread.reduce((sum, { heat, from, to }) => sum + (temperature > from && temperature < to ? heat / (to - from) : 0), 0);
    this.capacity = new Pieces(
      endsOf([material.density, material.heatCapacity], corners, range),
      (temperature) => density(temperature) * (specific(temperature) + inChange(temperature)),
    );
    this.jumps = changes
      .filter(({ from, to }) => to === from)
      .map(({ heat, from }) => ({ temperature: from, heat: heat * density(from) }))
      .sort((a, b) => a.temperature - b.temperature);
  }

  /** Heat content, J/m³, and its slope; at the temperature of a jump, the heat content before it. */
  heatAt(temperature: number): { heat: number; capacity: number } {
    this.capacity.read(temperature);
    const jumped = this.jumps.reduce((sum, jump) => sum + (jump.temperature < temperature ? jump.heat : 0), 0);
    return { heat: this.capacity.integral + jumped, capacity: this.capacity.value };
  }

  /** Reads `temperature` and `slope` at a heat content. */
  readHeat(heat: number): void {
    let left = heat;
    for (const jump of this.jumps) {
      this.capacity.read(jump.temperature);
      const before = this.capacity.integral;
      if (left <= before) break;
      if (left < before + jump.heat) {
        this.temperature = jump.temperature;
        this.slope = 0;
        return;
      }
      left -= jump.heat;
    }
    this.temperature = this.capacity.inverse(left);
    this.capacity.read(this.temperature);
    this.slope = 1 / this.capacity.value;
  }
}

export function property(curve: Curve): Property {
  if (typeof curve === 'number') return () => curve;
  if ('table' in curve) return (temperature) => tableAt(curve.table, temperature);
  const read = readExpression(curve.expression, ['T']);
  if (read.kind === 'refused') throw new RangeError(read.message);
  return (temperature) => read.evaluate([temperature]);
}

/** Straight between the points, constant beyond. */
export function tableAt(table: readonly (readonly [number, number])[], x: number): number {
  if (x <= table[0][0]) return table[0][1];
  for (let i = 1; i < table.length; i++) {
    const [[x0, v0], [x1, v1]] = [table[i - 1], table[i]];
    if (x <= x1) return v0 + ((v1 - v0) * (x - x0)) / (x1 - x0);
  }
  return table[table.length - 1][1];
}

function endsOf(curves: readonly Curve[], corners: readonly number[], [low, high]: readonly [number, number]): number[] {
  const ends = new Set([low, high, ...corners]);
  for (const curve of curves) {
    if (typeof curve === 'number') continue;
    if ('table' in curve) for (const [x] of curve.table) ends.add(x);
    else for (let i = 1; i < EXPRESSION_PIECES; i++) ends.add(low + ((high - low) * i) / EXPRESSION_PIECES);
  }
  return [...ends].sort((a, b) => a - b);
}
