/**
 * Units put together from others: "BTU in/(hr ft2 degF)", "W/mK", "kcal/(m h °C)".
 *
 * Symbols are put into the words of mathjs's unit parser, which then does the arithmetic; nothing a person types is ever
 * evaluated. Temperatures in such units are differences, so degrees Celsius and Fahrenheit become K and degR: with degC
 * and degF mathjs would bring the offset back.
 */
import { create, createUnitDependencies, unitDependencies } from 'mathjs';

function makeUnits() {
  const math = create({ createUnitDependencies, unitDependencies });
  math.createUnit('cal', { definition: '4.1868 J', prefixes: 'short' }); // International Table
  return math;
}

let units: ReturnType<typeof makeUnits> | undefined;
/** Made when the first unit is put together: it takes a tenth of a second, which no start should wait for. */
const allUnits = (): ReturnType<typeof makeUnits> => (units ??= makeUnits());

/** Symbols that the unit parser lacks, or reads as something else (C and F are coulomb and farad to it). */
const SYMBOLS: Readonly<Record<string, string>> = {
  '°C': 'K',
  'C°': 'K',
  C: 'K',
  celsius: 'K',
  '°K': 'K',
  'K°': 'K',
  kelvin: 'K',
  '°F': 'degR',
  'F°': 'degR',
  F: 'degR',
  fahrenheit: 'degR',
  '°R': 'degR',
  'R°': 'degR',
  R: 'degR',
  rankine: 'degR',
  h: 'hour',
  hr: 'hour',
  hrs: 'hour',
  d: 'day',
  sec: 'second',
  Btu: 'BTU',
  btu: 'BTU',
  kBtu: 'kBTU',
  lbs: 'lb',
  μm: 'um',
  cc: 'cm^3',
  l: 'L',
  t: 'tonne',
};

/** "W/mK": run together, and read apart only where the units do not come out otherwise (mK is also a millikelvin). */
const readApart = (text: string): string => text.replace(/([A-Za-z])(K|°[CFK])(?![A-Za-z°])/g, '$1 $2');

const TOKEN = / ?(°[A-Z]|[A-Z]°|[A-Za-zμ]+|[()/]|[*·⋅×.]|-(?=[A-Za-z°]))(?:\^?([+-]?\d+))?/y;

/** A unit in the words of the unit parser; null where it has a sign that no unit has. */
function translate(text: string): string | null {
  let out = '';
  let position = 0;
  while (position < text.length) {
    TOKEN.lastIndex = position;
    const token = TOKEN.exec(text);
    if (token === null) return null;
    const [all, symbol, exponent] = token;
    position += all.length;
    if (/^[-*·⋅×.]$/.test(symbol)) continue;
    if (/^[)/]$/.test(symbol)) out += symbol;
    else {
      const word = Object.hasOwn(SYMBOLS, symbol) ? SYMBOLS[symbol] : symbol;
      out += (/[\w)]$/.test(out) ? '*' : '') + word;
    }
    if (exponent !== undefined) out += `^${exponent}`;
  }
  return out;
}

/** "W/m K" means W/(m K) to those who write it: all that follows one slash without brackets divides. */
const dividingAll = (text: string): string => (/^[^/()]*\/[^/()]+$/.test(text) ? `${text.replace('/', '/(')})` : text);

/** Size of a unit in the stored unit (both as tidied text and parser words), or null if it is no unit of that kind. */
export function compoundFactor(text: string, stored: string): number | null {
  for (const reading of new Set([text, dividingAll(text), dividingAll(readApart(text))])) {
    const words = translate(reading);
    if (words === null || words === '') continue;
    try {
      return allUnits().unit(1, words).toNumber(stored);
    } catch {
      // not a unit, or not of this kind, in this reading
    }
  }
  return null;
}

/** A unit without what can be left out or written otherwise, for comparing beginnings while a person types. */
export const bareWords = (text: string): string => (translate(text) ?? text).replace(/[()*^ ]/g, '').toLowerCase();
