/** Random stages: what the faces meet, heat sources, and set-points. */
import type { Exposure, Source, Stage } from '../../../solver/model';
import { round, type Dice } from './dice';
import type { Trade } from './trades';

type Schedule = number | { follow: 'setPoint'; offset: number } | { start: number; segments: object[] } | { expression: string };

export interface StagePhysics {
  radiation: boolean;
  quenchTables: boolean;
  expressions: boolean;
  sources: boolean;
}

/** A temperature over a stage of a length, within the trade's range. */
function temperatureOver(dice: Dice, trade: Trade, length: number, physics: StagePhysics): Schedule {
  const value = (): number => dice.between(...trade.surroundings);
  if (dice.chance(0.25)) return { follow: 'setPoint', offset: dice.chance(0.5) ? 0 : dice.between(-10, 10) };
  if (dice.chance(0.4)) return value();
  if (physics.expressions && dice.chance(0.25)) {
    const [a, b] = [value(), value()];
    const swing = round(0.5 * Math.abs(a - b));
    return { expression: `${round(0.5 * (a + b))} + ${swing}*sin(2*pi*t/${round(length / dice.between(0.5, 3))})` };
  }
  const segments = Array.from({ length: dice.whole(1, 3) }, () =>
    dice.chance(0.35)
      ? { hold: round(length * dice.between(0.05, 0.3)) }
      : { to: value(), duration: dice.chance(0.15) ? 0 : round(length * dice.between(0.05, 0.5)) },
  );
  return { start: value(), segments };
}

/** A film coefficient over the temperature of the face, as in a quench: low, a peak of boiling, low again. */
function quenchCurve(dice: Dice, [low, high]: readonly [number, number]): { table: [number, number][] } {
  const peak = dice.log(high / 2, 1.5 * high);
  return {
    table: [
      [round(dice.between(60, 100)), round(dice.log(low, high / 3))],
      [round(dice.between(180, 320)), round(peak)],
      [round(dice.between(420, 560)), round(peak * dice.between(0.15, 0.4))],
      [round(dice.between(700, 850)), round(peak * dice.between(0.05, 0.15))],
    ],
  };
}

/** What the part is like as a whole. */
export interface PartScale {
  /** Time that heat needs through it, s. */
  readonly time: number;
  /** Conductance from face to face, W/(m²·K). */
  readonly conductance: number;
  /** Temperature that it starts at, °C. */
  readonly start: number;
}

/** A flux that brings a part of the trade's temperatures across the part, or warms it by as much in the stage, W/m². */
function fluxScale(dice: Dice, trade: Trade, { conductance, start, time }: PartScale, length: number): number {
  const span = dice.between(...trade.surroundings) - start;
  return round((dice.between(0.2, 0.8) * span * conductance) / Math.max(1, (2 * length) / time));
}

export function randomExposure(dice: Dice, trade: Trade, length: number, scale: PartScale, physics: StagePhysics): Exposure {
  const temperature = (): never => temperatureOver(dice, trade, length, physics) as never;
  const kind = dice.next();
  if (kind < 0.13) return { kind: 'insulated' };
  if (kind < 0.23) return { kind: 'temperature', temperature: temperature() };
  if (kind < 0.33) {
    const flux = fluxScale(dice, trade, scale, length);
    const ramp = {
      start: 0,
      segments: [
        { to: round(flux), duration: round(0.3 * length) },
        { to: 0, duration: round(0.3 * length) },
      ],
    };
    return { kind: 'flux', flux: dice.chance(0.5) ? round(flux / 2) : ramp };
  }
  if (kind < 0.41 && physics.radiation && trade.radiates) {
    return { kind: 'radiation', emissivity: dice.between(0.3, 0.95), enclosure: temperature() };
  }
  return {
    kind: 'film',
    coefficient: coefficientOver(dice, trade, length, physics),
    surroundings: temperature(),
    ...(physics.radiation && trade.radiates && dice.chance(0.6) ? { radiation: radiationBeside(dice, temperature) } : {}),
  };
}

const radiationBeside = (dice: Dice, temperature: () => never): { emissivity: number; enclosure?: never } => ({
  emissivity: dice.between(0.3, 0.95),
  ...(dice.chance(0.3) ? { enclosure: temperature() } : {}),
});

type FilmExposure = Extract<Exposure, { kind: 'film' }>;

function coefficientOver(dice: Dice, trade: Trade, length: number, physics: StagePhysics): FilmExposure['coefficient'] {
  const value = (): number => dice.log(...trade.film);
  if (physics.quenchTables && trade.name === 'quench' && dice.chance(0.6)) return quenchCurve(dice, trade.film);
  if (physics.expressions && dice.chance(0.12)) {
    const h = value();
    return { expression: `${h}*(1 + ${round(dice.between(0.1, 0.6))}*tanh((Ts - ${round(dice.between(50, 300))})/200))` };
  }
  if (dice.chance(0.15)) return { start: value(), segments: [{ to: value(), duration: round(length * dice.between(0.1, 0.6)) }] };
  return value();
}

/** A random stage. */
export function randomStage(
  dice: Dice,
  trade: Trade,
  index: number,
  scale: PartScale,
  layers: readonly string[],
  physics: StagePhysics,
): Stage {
  const length = round(scale.time * dice.log(0.15, 2.5));
  const face = (): Exposure => randomExposure(dice, trade, length, scale, physics);
  const target = dice.between(...trade.surroundings);
  const setPoint = dice.chance(0.5)
    ? { segments: [{ to: target, duration: round(length * dice.between(0.1, 0.8)) }] }
    : undefined;
  return {
    id: `s${index + 1}`,
    name: `Stage ${index + 1}`,
    end: { after: length },
    ...(setPoint === undefined ? {} : { setPoint }),
    exposures: { start: face(), end: face() },
    ...(physics.sources && dice.chance(0.3) ? { sources: [randomSource(dice, trade, length, layers, physics)] } : {}),
  };
}

/** A source that would warm its layer, left alone, by a part of the trade's span in the stage. */
function randomSource(dice: Dice, trade: Trade, length: number, layers: readonly string[], physics: StagePhysics): Source {
  const span = Math.abs(trade.surroundings[1] - trade.starts[0]);
  const capacity = dice.log(...trade.density) * dice.log(...trade.heatCapacity);
  const power = round((capacity * span * dice.between(0.05, 0.4)) / length);
  const layer = dice.pick(layers);
  if (physics.expressions && dice.chance(0.4)) {
    return { layer, power: { expression: `${power}*exp(-x/${round(2 * trade.size[1])})*(1 + 0.3*sin(6*t/${length}))` } };
  }
  if (dice.chance(0.5)) return { layer, power };
  return {
    layer,
    power: {
      start: 0,
      segments: [{ to: power, duration: round(0.2 * length) }, { hold: round(0.3 * length) }, { to: 0, duration: 0 }],
    },
  };
}
