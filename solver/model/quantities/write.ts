/** Writes quantities: digits without noise, a true minus sign, durations in hours and minutes. */
import { displayUnit, toDisplay, type QuantityKind, type UnitSystem } from './kinds';

export interface NumberStyle {
  /** At most so many significant digits, trailing zeros dropped, whole part kept. Default 6. */
  significant?: number;
  /** Exactly so many decimals, instead of significant digits. */
  decimals?: number;
  /** A plus sign before positive numbers. */
  sign?: boolean;
}

export interface Written {
  /** "−26.5"; a dash where there is no number. */
  number: string;
  /** Empty for a fraction, and for a time, whose units stand inside the number. */
  unit: string;
  /** Both, with a space between. */
  text: string;
}

const NOTHING = '–';
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A stored value (SI base units, °C) in the display unit. A time is written out in full: "45 min 30 s". */
export function formatQuantity(value: number, kind: QuantityKind, system: UnitSystem, style: NumberStyle = {}): Written {
  if (kind === 'time') {
    const text = formatDuration(value, { ...style, exact: true });
    return { number: text, unit: '', text };
  }
  const number = formatNumber(toDisplay(value, kind, system), style);
  const unit = displayUnit(kind, system);
  return { number, unit, text: unit === '' ? number : `${number} ${unit}` };
}

/** A number without unit: "1234.5", "−0.04", "3·10⁻¹³". */
export function formatNumber(value: number, style: NumberStyle = {}): string {
  if (!Number.isFinite(value)) return NOTHING;
  const digits =
    style.decimals === undefined
      ? significantDigits(Math.abs(value), style.significant ?? 6)
      : Math.abs(value).toFixed(style.decimals);
  const zero = !/[1-9]/.test(digits);
  const sign = zero ? '' : value < 0 ? '−' : style.sign === true ? '+' : '';
  return sign + digits;
}

function significantDigits(size: number, significant: number): string {
  if (size === 0) return '0';
  if (size < 1e-4 || size >= 1e9) {
    const [mantissa, exponent] = size.toExponential(significant - 1).split('e');
    return `${Number(mantissa)}·10${superscript(exponent.replace('+', ''))}`;
  }
  const wholeDigits = Math.floor(Math.log10(size)) + 1;
  return String(Number(size.toPrecision(Math.max(significant, wholeDigits))));
}

const superscript = (exponent: string): string =>
  [...exponent].map((digit) => (digit === '-' ? '⁻' : SUPERSCRIPTS[Number(digit)])).join('');

const MINUTE = 60;
const HOUR = 3600;
const DAY = 24 * HOUR;

export interface DurationStyle extends NumberStyle {
  /** Written out so that nothing is lost, rather than rounded to what a reader needs. */
  exact?: boolean;
}

/** "28 h 00 min"; seconds only under 10 min, days from 4 d on; `exact` adds what that leaves out: "45 min 30 s". */
export function formatDuration(seconds: number, style: DurationStyle = {}): string {
  if (!Number.isFinite(seconds)) return NOTHING;
  const size = Math.abs(seconds);
  const text = (style.exact === true ? exactDuration(size, style.significant ?? 6) : null) ?? roundedDuration(size);
  const sign = /[1-9]/.test(text) ? (seconds < 0 ? '−' : style.sign === true ? '+' : '') : '';
  return sign + text;
}

const two = (count: number): string => String(count).padStart(2, '0');

function roundedDuration(size: number): string {
  if (size < 9.95) return `${significantDigits(size, 2)} s`;
  if (Math.round(size) < MINUTE) return `${Math.round(size)} s`;
  if (Math.round(size) < 10 * MINUTE) {
    const whole = Math.round(size);
    return `${Math.floor(whole / MINUTE)} min ${two(whole % MINUTE)} s`;
  }
  const minutes = Math.round(size / MINUTE);
  if (minutes < 60) return `${minutes} min`;
  if (minutes * MINUTE < 4 * DAY) return `${Math.floor(minutes / 60)} h ${two(minutes % 60)} min`;
  const hours = Math.round(size / HOUR);
  return `${Math.floor(hours / 24)} d ${two(hours % 24)} h`;
}

/** All the parts that are not zero, or null where the rounded form says the same. */
function exactDuration(size: number, significant: number): string | null {
  const whole = Number(size.toPrecision(12));
  const days = whole >= 4 * DAY ? Math.floor(whole / DAY) : 0;
  const hours = Math.floor((whole - days * DAY) / HOUR);
  const minutes = Math.floor((whole - days * DAY - hours * HOUR) / MINUTE);
  const seconds = Number((whole - days * DAY - hours * HOUR - minutes * MINUTE).toPrecision(significant));
  const lost = days > 0 ? minutes > 0 || seconds > 0 : whole >= 10 * MINUTE ? seconds > 0 : seconds % 1 > 0;
  if (!lost) return null;
  const parts = [
    [days, 'd'],
    [hours, 'h'],
    [minutes, 'min'],
    [seconds, 's'],
  ] as const;
  return parts
    .filter(([count]) => count > 0)
    .map(([count, unit]) => `${significantDigits(count, significant)} ${unit}`)
    .join(' ');
}
