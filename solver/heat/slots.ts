/**
 * H, Θ and their slopes at every slot of a part: the only place that reads the curves of materials in an inner loop.
 *
 * Everything is by the unknown v of the slot's node: a temperature, or a heat content on the scale of one
 * (materials/heatTables.ts). A layer of constant properties is worked out from three numbers; all others read one long table,
 * with a hint a slot where it was last read.
 */
import { argumentAt, H0, REF, rowOf, T0, T1, THETA0 } from '../materials';
import type { LayerRows, PartRows } from './partRows';

export class Slots {
  /** H, J/m³, and Θ, W/m. */
  readonly heat: Float64Array;
  readonly conduction: Float64Array;
  /** dH/dv and dΘ/dv. */
  readonly capacity: Float64Array;
  readonly conductivity: Float64Array;
  private readonly table: Float64Array;
  private readonly hint: Int32Array;
  /** By layer: ρ c, k and the temperature where H and Θ are zero; null where it reads the table. */
  private readonly constants: readonly (readonly [number, number, number] | null)[];
  /** Of unknowns that count heat: one of their slots, or −1; and its table. */
  private readonly heatSlot: Int32Array;
  private readonly heatTable = new Map<number, Float64Array>();

  constructor({ layers, slots, size, heatNodes }: PartRows) {
    const column = () => new Float64Array(slots);
    this.heat = column();
    this.conduction = column();
    this.capacity = column();
    this.conductivity = column();
    this.hint = new Int32Array(slots);
    const tables = new TableSet();
    const counted = new Set(heatNodes.flatMap((node) => node.slots));
    this.constants = layers.map(({ layer: { curves, initial }, first, count }) => {
      const tabled = !curves.constant || counted.has(first) || counted.has(first + count - 1);
      if (tabled) this.hint.fill(tables.place(curves.rows), first, first + count);
      return tabled ? null : [curves.heatCapacity(initial), curves.conductivity(initial), initial];
    });
    this.heatSlot = new Int32Array(size).fill(-1);
    for (const { row, slots: own, tables: ownTables } of heatNodes) {
      own.forEach((slot, i) => (this.hint[slot] = tables.place(ownTables[i])));
      this.heatSlot[row] = own[0];
      this.heatTable.set(row, ownTables[0]);
    }
    this.table = tables.joined();
  }

  /** H and Θ of one layer. */
  evaluate(index: number, { first, count, node }: LayerRows, v: Float64Array): void {
    const { heat, conduction, table, hint } = this;
    const constants = this.constants[index];
    if (constants !== null) {
      const [capacity, conductivity, reference] = constants;
      for (let slot = first, row = node; slot < first + count; slot++, row++) {
        const d = v[row] - reference;
        heat[slot] = capacity * d;
        conduction[slot] = conductivity * d;
      }
      return;
    }
    for (let slot = first, row = node; slot < first + count; slot++, row++) {
      const value = v[row];
      const at = rowOf(table, value, hint[slot]);
      hint[slot] = at;
      const d = value - table[at + REF];
      heat[slot] = table[at + H0] + d * (table[at + H0 + 1] + d * (table[at + H0 + 2] + d * table[at + H0 + 3]));
      conduction[slot] =
        table[at + THETA0] + d * (table[at + THETA0 + 1] + d * (table[at + THETA0 + 2] + d * table[at + THETA0 + 3]));
    }
  }

  /** dH/dv and dΘ/dv of one layer. */
  linearise(index: number, { first, count, node }: LayerRows, v: Float64Array): void {
    const { capacity, conductivity, table, hint } = this;
    const constants = this.constants[index];
    if (constants !== null) {
      capacity.fill(constants[0], first, first + count);
      conductivity.fill(constants[1], first, first + count);
      return;
    }
    for (let slot = first, row = node; slot < first + count; slot++, row++) {
      const value = v[row];
      const at = rowOf(table, value, hint[slot]);
      hint[slot] = at;
      const d = value - table[at + REF];
      capacity[slot] = table[at + H0 + 1] + d * (2 * table[at + H0 + 2] + 3 * d * table[at + H0 + 3]);
      conductivity[slot] = table[at + THETA0 + 1] + d * (2 * table[at + THETA0 + 2] + 3 * d * table[at + THETA0 + 3]);
    }
  }

  /** H at one slot. */
  heatAt(index: number, slot: number, value: number): number {
    const constants = this.constants[index];
    if (constants !== null) return constants[0] * (value - constants[2]);
    const { table, hint } = this;
    const at = rowOf(table, value, hint[slot]);
    const d = value - table[at + REF];
    return table[at + H0] + d * (table[at + H0 + 1] + d * (table[at + H0 + 2] + d * table[at + H0 + 3]));
  }

  /** Whether an unknown counts heat. */
  countsHeat(row: number): boolean {
    return this.heatSlot[row] >= 0;
  }

  /** T of an unknown, °C. */
  temperature(row: number, value: number): number {
    const slot = this.heatSlot[row];
    if (slot < 0) return value;
    const { table } = this;
    const at = rowOf(table, value, this.hint[slot]);
    return table[at + T0] + table[at + T1] * (value - table[at + REF]);
  }

  /** dT/dv of an unknown. */
  temperatureSlope(row: number, value: number): number {
    const slot = this.heatSlot[row];
    return slot < 0 ? 1 : this.table[rowOf(this.table, value, this.hint[slot]) + T1];
  }

  /** The value of an unknown at a temperature, °C; where T stands still, at the upper end. */
  unknownAt(row: number, temperature: number): number {
    const table = this.heatTable.get(row);
    return table === undefined ? temperature : argumentAt(table, temperature);
  }
}

/** Tables one behind the other, each once. */
class TableSet {
  private readonly places = new Map<Float64Array, number>();
  private length = 0;

  place(table: Float64Array): number {
    let at = this.places.get(table);
    if (at === undefined) {
      at = this.length;
      this.places.set(table, at);
      this.length += table.length;
    }
    return at;
  }

  joined(): Float64Array {
    const all = new Float64Array(this.length);
    for (const [table, at] of this.places) all.set(table, at);
    return all;
  }
}
