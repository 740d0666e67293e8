/** The trades that the random plans come from: what is heated or cooled there, how hot, and how hard. Round numbers. */
import type { Curve, Latent, Material, Reaction } from '../../../solver/model';
import { round, type Dice } from './dice';

export interface Trade {
  readonly name: string;
  /** Temperatures that parts start at, and that their surroundings have, °C. */
  readonly starts: readonly [number, number];
  readonly surroundings: readonly [number, number];
  /** Film coefficient, W/(m²·K). */
  readonly film: readonly [number, number];
  /** Half thickness or radius of a layer, m. */
  readonly size: readonly [number, number];
  /** k W/(m·K), ρ kg/m³, cp J/(kg·K). */
  readonly conductivity: readonly [number, number];
  readonly density: readonly [number, number];
  readonly heatCapacity: readonly [number, number];
  /** Change of phase: temperature range, heat J/kg, greatest width K. */
  readonly latent?: { readonly at: readonly [number, number]; readonly heat: readonly [number, number]; readonly width: number };
  readonly reaction?: (dice: Dice) => Reaction;
  readonly radiates: boolean;
}

const hydration = (dice: Dice): Reaction => ({
  kind: 'hydration',
  heat: dice.between(30e3, 60e3),
  ultimate: dice.between(0.6, 0.85),
  time: dice.between(8, 20) * 3600,
  slope: dice.between(0.8, 1.4),
  activationEnergy: dice.between(30e3, 42e3),
  reference: 20,
  age: 3600,
});

const cure = (dice: Dice): Reaction =>
  dice.chance(0.5)
    ? {
        kind: 'nthOrder',
        heat: dice.between(40e3, 150e3),
        factor: dice.log(1e4, 1e5),
        activationEnergy: dice.between(60e3, 66e3),
        order: dice.between(1, 2),
        initial: 0,
      }
    : {
        kind: 'autocatalytic',
        heat: dice.between(40e3, 120e3),
        first: { factor: dice.log(1e3, 1e4), activationEnergy: dice.between(60e3, 65e3) },
        second: { factor: dice.log(1e4, 5e4), activationEnergy: dice.between(55e3, 60e3) },
        m: dice.between(0.5, 1),
        n: dice.between(1, 2),
        initial: 0.01,
      };

export const TRADES: readonly Trade[] = [
  {
    name: 'forge',
    starts: [20, 400],
    surroundings: [500, 1200],
    film: [40, 400],
    size: [0.01, 0.2],
    conductivity: [15, 60],
    density: [7000, 8200],
    heatCapacity: [420, 700],
    radiates: true,
  },
  {
    name: 'quench',
    starts: [780, 1050],
    surroundings: [20, 90],
    film: [300, 6000],
    size: [0.005, 0.06],
    conductivity: [15, 60],
    density: [2700, 8000],
    heatCapacity: [450, 950],
    radiates: false,
  },
  {
    name: 'lining',
    starts: [10, 60],
    surroundings: [200, 1000],
    film: [10, 80],
    size: [0.03, 0.25],
    conductivity: [0.3, 4],
    density: [800, 3000],
    heatCapacity: [800, 1200],
    latent: { at: [100, 160], heat: [5e4, 2e5], width: 40 },
    radiates: true,
  },
  {
    name: 'mould',
    starts: [20, 60],
    surroundings: [150, 700],
    film: [50, 1500],
    size: [0.005, 0.08],
    conductivity: [20, 180],
    density: [2700, 7800],
    heatCapacity: [450, 950],
    radiates: true,
  },
  {
    name: 'panel',
    starts: [15, 40],
    surroundings: [80, 180],
    film: [15, 120],
    size: [0.002, 0.03],
    conductivity: [0.2, 5],
    density: [1100, 2000],
    heatCapacity: [900, 1500],
    reaction: cure,
    radiates: false,
  },
  {
    name: 'food',
    starts: [-20, 85],
    surroundings: [-35, 10],
    film: [10, 400],
    size: [0.005, 0.06],
    conductivity: [0.25, 1.6],
    density: [850, 1100],
    heatCapacity: [1800, 4000],
    latent: { at: [-6, -1], heat: [1e5, 2.6e5], width: 6 },
    radiates: false,
  },
  {
    name: 'concrete',
    starts: [10, 30],
    surroundings: [-5, 60],
    film: [3, 25],
    size: [0.1, 0.6],
    conductivity: [1.2, 2.5],
    density: [2200, 2500],
    heatCapacity: [850, 1100],
    reaction: hydration,
    radiates: false,
  },
  {
    name: 'casting',
    starts: [600, 760],
    surroundings: [20, 300],
    film: [50, 1500],
    size: [0.01, 0.1],
    conductivity: [60, 180],
    density: [2300, 2700],
    heatCapacity: [900, 1150],
    latent: { at: [540, 590], heat: [2e5, 4e5], width: 60 },
    radiates: true,
  },
];

/** Which of the harder kinds of physics a material may have. */
export interface MaterialPhysics {
  curves: boolean;
  latent: boolean;
  plateau: boolean;
  reaction: boolean;
}

/** A random material of a trade, its curves within 60 % of a middle value over the temperatures that the trade meets. */
export function randomMaterial(dice: Dice, trade: Trade, id: string, physics: MaterialPhysics): Material {
  const low = Math.min(trade.starts[0], trade.surroundings[0]);
  const high = Math.max(trade.starts[1], trade.surroundings[1]);
  const curve = (range: readonly [number, number], bend: number): Curve => {
    const middle = dice.log(...range);
    return physics.curves && dice.chance(0.6) ? bent(dice, middle, bend, low, high) : middle;
  };
  const conductivity = curve(trade.conductivity, 0.5);
  const heatCapacity = curve(trade.heatCapacity, 0.3);
  const changes = physics.latent && trade.latent !== undefined;
  // Density is left constant where heat is counted by the kilogram.
  const constant = changes || (physics.reaction && trade.reaction !== undefined);
  const density = constant ? dice.log(...trade.density) : curve(trade.density, 0.08);
  const material: Material = { id, name: `${trade.name} ${id}`, conductivity, density, heatCapacity };
  if (changes && trade.latent !== undefined) material.latent = [change(dice, trade.latent, physics.plateau)];
  else if (physics.reaction && trade.reaction !== undefined) material.reaction = trade.reaction(dice);
  return material;
}

function change(dice: Dice, latent: NonNullable<Trade['latent']>, plateau: boolean): Latent {
  const from = dice.between(...latent.at);
  return { heat: dice.log(...latent.heat), from, to: plateau ? from : round(from + dice.between(0.25, 1) * latent.width) };
}

/** A table or an expression that stays within a part `bend` of its middle value. */
function bent(dice: Dice, middle: number, bend: number, low: number, high: number): Curve {
  if (dice.chance(0.25)) {
    // A gentle S over the whole range.
    const centre = round(0.5 * (low + high));
    const by = round(middle * bend * dice.between(-0.9, 0.9));
    const sign = by < 0 ? '-' : '+';
    return { expression: `${middle} ${sign} ${Math.abs(by)}*tanh((T - ${centre})/${round(0.35 * (high - low))})` };
  }
  const count = dice.whole(2, 6);
  const table = Array.from({ length: count }, (_, i): [number, number] => [
    round(low + ((high - low) * (i + 0.4 * dice.next())) / (count - 0.6)),
    round(middle * (1 + bend * dice.between(-1, 1))),
  ]);
  return { table };
}
