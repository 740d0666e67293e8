/**
 * Numbers as people type them: "1.5", "1,5", "1 234.5", "1,234,567", "2 1/4", "2½", "3e-4", "3·10⁻⁴", "−5".
 */

/** What a comma before exactly three digits means: the text alone cannot tell. */
export type CommaReading = 'decimal' | 'grouping';

export interface NumberFound {
  value: number;
  /** Length of the text that it took. */
  length: number;
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** One form for the many ways to write the same: spaces, minus signs, superscripts, fractions, quotes, degree signs. */
export function tidy(text: string): string {
  return text
    .replace(/[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (run) => `^${[...run].map(plainSuperscript).join('')}`)
    .replace(/(\d)(?=[¼-¾⅐-⅞])/g, '$1 ')
    .replace(/º|˚/g, '°')
    .normalize('NFKC')
    .replace(/⁄/g, '/')
    .replace(/[−–]/g, '-')
    .replace(/[″”“]|′′|''/g, '"')
    .replace(/[′’‘]/g, "'")
    .replace(/\s+/g, ' ')
    .trim();
}

const plainSuperscript = (sign: string): string => (sign === '⁻' ? '-' : sign === '⁺' ? '' : String(SUPERSCRIPTS.indexOf(sign)));

const FRACTION = /^(?:(\d{1,6})[ -])?(\d{1,6}) ?\/ ?(\d{1,6})(?![\d.,])/;
const SPACED = /^\d{1,3}(?: \d{3})+(?![\d/])(?:[.,]\d+)?/;
const PLAIN = /^(?:\d[\d.,]*|[.,]\d+)/;
const POWER = /^(?:e([+-]?\d{1,3})(?![\d.])| ?[×x*·⋅] ?10\^([+-]?\d{1,3}))/i;

/** The number at the start of a tidied text, without its sign; null if none stands there. */
export function numberAt(text: string, comma: CommaReading): NumberFound | null {
  const fraction = FRACTION.exec(text);
  if (fraction !== null) {
    const [all, whole, top, bottom] = fraction;
    const value = Number(whole ?? 0) + Number(top) / Number(bottom);
    return Number.isFinite(value) ? { value, length: all.length } : null;
  }
  const digits = (SPACED.exec(text) ?? PLAIN.exec(text))?.[0];
  if (digits === undefined) return null;
  const mantissa = plainNumber(digits.replaceAll(' ', ''), comma);
  if (mantissa === null) return null;
  const power = POWER.exec(text.slice(digits.length));
  const value = power === null ? mantissa : Number(`${mantissa}e${power[1] ?? power[2]}`);
  return Number.isFinite(value) ? { value, length: digits.length + (power?.[0].length ?? 0) } : null;
}

/** Digits with points and commas, no spaces. */
function plainNumber(digits: string, comma: CommaReading): number | null {
  const marks = digits.replace(/\d/g, '');
  if (/^[1-9]\d{0,2},\d{3}$/.test(digits)) return Number(digits.replace(',', comma === 'decimal' ? '.' : ''));
  if (marks.length <= 1) return Number(digits.replace(',', '.'));
  // Several marks: all but a last, different one group digits by three.
  const grouped = /^(\d{1,3}(?:([.,])\d{3})(?:\2\d{3})*)(?:(?!\2)[.,](\d*))?$/.exec(digits);
  if (grouped === null) return null;
  return Number(`${grouped[1].replaceAll(grouped[2], '')}.${grouped[3] ?? ''}`);
}
