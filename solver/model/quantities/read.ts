/**
 * Reads a quantity as a person types it, and says what it understood, what is still missing, or what to try.
 *
 * Number and unit are split here; common units come from our own table, other compound ones from the unit parser.
 */
import { bareWords, compoundFactor } from './compound';
import { KINDS, shownUnit, storedValue, type QuantityKind, type Unit, type UnitSystem } from './kinds';
import { numberAt, tidy, type CommaReading } from './numbers';
import { formatNumber, formatQuantity } from './write';

export type QuantityReading =
  /** A value in SI base units (°C for a temperature), and what was understood in the display unit: "76.2 mm". */
  | { kind: 'value'; value: number; echo: string }
  /** Not a quantity yet, but the beginning of one; `hint` says what could follow. */
  | { kind: 'partial'; hint: string }
  /** Two readings, to be asked about: "1,234". */
  | { kind: 'choice'; choices: { text: string; value: number }[] }
  | { kind: 'refused'; message: string };

/** Longest text that is looked at, characters. */
export const MAX_TYPED = 60;

const ABSOLUTE_ZERO_C = -273.15;

/** The unit of amounts that were added up in stored units. */
const SUMMED: Unit = { text: '', factor: 1 };

/** Reads `text` as a quantity; a bare number is taken in the unit that the kind is shown in. */
export function readQuantity(text: string, kind: QuantityKind, system: UnitSystem): QuantityReading {
  if (text.length > MAX_TYPED) return { kind: 'refused', message: `This is too long: at most ${MAX_TYPED} characters.` };
  const whole = tidy(text);
  const negative = whole.startsWith('-');
  const unsigned = whole.replace(/^[+-] ?/, '');
  const parsed = unsigned === '' ? start() : parse(unsigned, kind, system, 'decimal');
  if (parsed === null) return { kind: 'refused', message: refusal(text.trim(), whole, kind, system) };
  if ('offered' in parsed) return { kind: 'partial', hint: hintOf(parsed.offered, kind, system) };
  const reading = valueOf(parsed, negative, text.trim(), kind, system);
  const grouped = parse(unsigned, kind, system, 'grouping');
  if (grouped === null || 'offered' in grouped || grouped.amount === parsed.amount) return reading;
  const choices = [parsed, grouped].flatMap((amount) => {
    const read = valueOf(amount, negative, text.trim(), kind, system);
    return read.kind === 'value' ? [{ text: said(amount, negative, read), value: read.value }] : [];
  });
  if (choices.length > 1) return { kind: 'choice', choices };
  return reading.kind === 'value' ? reading : valueOf(grouped, negative, text.trim(), kind, system);
}

type ValueRead = Extract<QuantityReading, { kind: 'value' }>;

/** An amount, still without its sign, in a unit. */
interface Amount {
  amount: number;
  unit: Unit;
}
/** The beginning of something; `offered` names units that could follow, if any are near. */
interface Start {
  offered: string[];
}
type Parsed = Amount | Start | null;

const start = (...offered: string[]): Start => ({ offered });

/** The stored value of an amount, or why there is none. */
function valueOf(
  { amount, unit }: Amount,
  negative: boolean,
  typed: string,
  kind: QuantityKind,
  system: UnitSystem,
): ValueRead | { kind: 'refused'; message: string } {
  // 15 digits: what a factor adds in the last place (0.35000000000000003) is no part of what was typed.
  const value = Number(storedValue(negative ? -amount : amount, unit).toPrecision(15));
  const refuse = (message: string) => ({ kind: 'refused' as const, message });
  if (!Number.isFinite(value)) return refuse(`"${typed}" is too large.`);
  if (kind === 'temperature' && value < ABSOLUTE_ZERO_C) {
    return refuse(`"${typed}" lies below absolute zero, ${formatQuantity(ABSOLUTE_ZERO_C, kind, system).text}.`);
  }
  if (kind === 'fraction' && (value < 0 || value > 1)) {
    const percent = value > 1 && value <= 100 && unit.factor === 1 ? ` Try ${amount} %.` : '';
    return refuse(`"${typed}" is not between 0 and 1.${percent}`);
  }
  return { kind: 'value', value: value === 0 ? 0 : value, echo: formatQuantity(value, kind, system, { significant: 4 }).text };
}

/** One of two readings as it would be typed without doubt: "1.234 in". */
const said = ({ amount, unit }: Amount, negative: boolean, read: ValueRead): string =>
  unit === SUMMED ? read.echo : `${formatNumber(negative ? -amount : amount, { significant: 12 })} ${unit.text}`.trim();

function parse(text: string, kind: QuantityKind, system: UnitSystem, comma: CommaReading): Parsed {
  if (kind === 'time') {
    const clock = clockTime(text);
    if (clock !== null) return clock;
  }
  const number = numberAt(text, comma);
  if (number === null) return /^[.,]$/.test(text) ? start() : null;
  const rest = text.slice(number.length).trim();
  if (rest === '') return { amount: number.value, unit: shownUnit(kind, system) };
  // "2 1/", "3e-" and "3·10^": the number itself goes on.
  if (/^(?:\d* ?\/|\d+|e[+-]?|[×·]|[×x*·] ?1(0\^?-?)?)$/i.test(rest)) return start();
  const unit = unitOf(rest, kind);
  if (unit !== null) return { amount: number.value, unit };
  return sumOfTerms(text, kind, comma) ?? startOfUnit(rest, kind);
}

/** "1:30" is 1 h 30 min, "1:30:15" has seconds as well. */
function clockTime(text: string): Parsed {
  const clock = /^(\d{1,4}):(\d{0,2})(?::(\d{0,2}))?$/.exec(text);
  if (clock === null) return null;
  const [, hours, minutes, seconds] = clock;
  if (minutes.length < 2 || (seconds !== undefined && seconds.length < 2)) return start();
  if (Number(minutes) > 59 || Number(seconds ?? 0) > 59) return null;
  return { amount: Number(hours) * 3600 + Number(minutes) * 60 + Number(seconds ?? 0), unit: SUMMED };
}

function unitOf(text: string, kind: QuantityKind): Unit | null {
  const { units, stored } = KINDS[kind];
  const named = degreesNamed(text);
  const among = (same: (spelling: string) => boolean): Unit | undefined =>
    units.find((unit) => [unit.text, ...(unit.spellings ?? [])].some((spelling) => same(tidy(spelling))));
  const own = among((spelling) => spelling === named);
  if (own !== undefined) return own;
  const factor = stored === undefined ? null : compoundFactor(named, stored);
  if (factor !== null) return { text, factor };
  // Capitals come last: mW and MW differ, "Min" and "min" do not.
  return (named.includes('/') ? undefined : among((spelling) => spelling.toLowerCase() === named.toLowerCase())) ?? null;
}

/** "degF", "deg. F", "degrees F" and "in." as the table has them. */
const degreesNamed = (text: string): string =>
  text
    .replace(/ per /g, '/')
    .replace(/\bdeg(?:ree)?s?\.? ?([CFKR]|celsius|fahrenheit|rankine)\b/gi, (_, scale: string) => `°${scale[0].toUpperCase()}`)
    .replace(/° ([CFKR])\b/g, '°$1')
    .replace(/([a-z])\.$/, '$1');

/** Units whose parts are added: "1 h 30 min", "5 ft 3 in". The parts get smaller; a last bare number is in the next smaller unit. */
const NEXT_SMALLER: Readonly<Record<string, string>> = { d: 'h', h: 'min', min: 's', ft: 'in', m: 'cm' };

function sumOfTerms(text: string, kind: QuantityKind, comma: CommaReading): Parsed {
  if (kind !== 'length' && kind !== 'time') return null;
  let rest = text;
  let total = 0;
  let last: Unit | null = null;
  while (rest !== '') {
    const number = numberAt(rest, comma);
    if (number === null) return null;
    const word = /^ ?('|"|[a-zμ]+\.?|)[ ,-]*/i.exec(rest.slice(number.length));
    if (word === null) return null;
    const named: string | undefined = word[1] === '' && last !== null ? NEXT_SMALLER[last.text] : word[1];
    if (named === undefined || named === '') return null;
    const unit: Unit | null = unitOf(named, kind);
    rest = rest.slice(number.length + word[0].length);
    if (unit === null) return rest === '' && last !== null ? startOfUnit(named, kind) : null;
    if (last !== null && (unit.factor >= last.factor || number.value * unit.factor >= last.factor)) return null;
    total += number.value * unit.factor;
    last = unit;
  }
  return { amount: total, unit: SUMMED };
}

/** Whether a unit text could still become a unit of the kind. */
function startOfUnit(text: string, kind: QuantityKind): Parsed {
  if (/^(?:°|d(?:e(?:g(?:r(?:e(?:es?)?)?)?)?)?\.?)$/i.test(text) && KINDS[kind].noun.includes('temperature')) {
    return start(...KINDS[kind].units.map((unit) => unit.text).slice(0, 3));
  }
  const bare = KINDS[kind].stored === undefined ? (word: string): string => word.toLowerCase() : bareWords;
  // The beginning of a degree says nothing yet: "BTU/(h ft d".
  const named = bare(degreesNamed(text.replace(/[ ·](?:°|deg?|d)$/, '')));
  const offered = KINDS[kind].units
    .filter((unit) => [unit.text, ...(unit.spellings ?? [])].some((spelling) => bare(tidy(spelling)).startsWith(named)))
    .map((unit) => unit.text);
  return named !== '' && offered.length > 0 ? start(...offered.slice(0, 3)) : null;
}

function hintOf(offered: string[], kind: QuantityKind, system: UnitSystem): string {
  if (offered.length > 0) return `${offered.join(', ').replace(/, ([^,]*)$/, ' or $1')}?`;
  const { noun, example } = KINDS[kind];
  return `${noun[0].toUpperCase()}${noun.slice(1)}, such as ${example[system]}`;
}

function refusal(typed: string, whole: string, kind: QuantityKind, system: UnitSystem): string {
  const { noun, example, display } = KINDS[kind];
  const difference = kind === 'temperature' ? /^([^A-Z]*) ?([CFKR])°$/.exec(whole) : null;
  if (difference !== null) return `"${typed}" is a temperature difference. Try ${difference[1].trim()} °${difference[2]}.`;
  const number = /^[+-]?\d+(?:\.\d+)?(?= ?[^\d.,:/]*$)/.exec(whole)?.[0].replace('-', '−');
  return `"${typed}" is not ${noun}. Try ${number === undefined ? example[system] : `${number} ${display[system]}`.trim()}.`;
}
