/** Problems speak in the units of the file; on screen they speak in those that are shown. */
import { formatQuantity, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';

const KINDS: Readonly<Record<string, QuantityKind>> = {
  m: 'length',
  '°C': 'temperature',
  K: 'temperatureDifference',
  s: 'time',
  'K/s': 'temperatureRate',
  'W/(m·K)': 'conductivity',
  'kg/m³': 'density',
  'J/(kg·K)': 'heatCapacity',
  'W/(m²·K)': 'filmCoefficient',
  'm²·K/W': 'contactResistance',
  'W/m²': 'heatFlux',
};

const escaped = (text: string): string => text.replace(/[/()]/g, String.raw`\$&`);

const NUMBER = String.raw`-?\d+(?:\.\d+)?(?:e[+-]?\d+)?`;
const WITH_UNIT = new RegExp(`(${NUMBER}) (${Object.keys(KINDS).map(escaped).join('|')})(?![\\w/²³(·])`);
const GOT = new RegExp(`got (${NUMBER})$`);

/** "must be more than 0 m, got -0.004" → "must be more than 0 mm, got −4 mm". Other messages stay as they are. */
export function problemInUnits(message: string, system: UnitSystem): string {
  const found = WITH_UNIT.exec(message);
  if (found === null) return message;
  const kind = KINDS[found[2]];
  const shown = (number: string): string => formatQuantity(Number(number), kind, system).text;
  return message.replace(found[0], shown(found[1])).replace(GOT, (_, number: string) => `got ${shown(number)}`);
}
