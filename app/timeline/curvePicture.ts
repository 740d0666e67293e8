/** What lies over the curves of a lane: limits, broken pieces, worst points and letters, as pixels. */
import { formatDuration, formatQuantity, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';
import {
  boxOf,
  clamp,
  historyAt,
  indexOfLargest,
  linePath,
  piecesBeyond,
  placeLetters,
  placeLineLabel,
  placePeakLabel,
  textWidth,
  type Box,
  type DrawnCurves,
  type Points,
  type Scale,
  type TextPlace,
} from '../draw';
import { worstBeyond, type Curves, type Series } from './series';

/** Columns at which curves are looked at to keep words off them. */
const COLUMNS = 64;
const TEXT_HEIGHT = 12;
/** A limit that counts at one instant is still a line, px. */
const LEAST_LINE = 12;

export interface Plot {
  time: Scale;
  value: Scale;
  width: number;
  height: number;
}

/** Every curve at a row of columns, px. */
export function drawnCurves({ series }: Curves, { time, value, width, height }: Plot): DrawnCurves {
  const columns = Array.from({ length: COLUMNS + 1 }, (_, i) => (i * width) / COLUMNS);
  const curves = series.map(({ history }) =>
    columns.map((x) => {
      const at = historyAt(history, time.valueAt(x));
      return at === null ? Number.NaN : value.at(at);
    }),
  );
  return { columns, curves, bottom: height - 1 };
}

export interface LimitLine {
  key: string;
  from: number;
  to: number;
  y: number;
  text: string;
  label: TextPlace;
}

/** Limits over the part of their window that is in sight. */
export function limitLines({ limits }: Curves, { time, value, width }: Plot, drawn: DrawnCurves): LimitLine[] {
  const taken: Box[] = [];
  return limits.flatMap((limit, index) => {
    const short = Math.max(0, LEAST_LINE - (time.at(limit.to) - time.at(limit.from))) / 2;
    const from = Math.max(0, time.at(limit.from) - short);
    const to = Math.min(width, time.at(limit.to) + short);
    if (to <= from) return [];
    const line = { from, to, y: value.at(limit.value) };
    const size = { width: textWidth(limit.text), height: TEXT_HEIGHT };
    const label = placeLineLabel(line, size, { ...drawn, taken });
    taken.push(boxOf(label, size));
    return [{ key: `${limit.requirement}:${index}`, ...line, text: limit.text, label }];
  });
}

const boxOfLimit = ({ text, label }: LimitLine): Box => boxOf(label, { width: textWidth(text), height: TEXT_HEIGHT });

/** Areas between a limit and the pieces of its curve that break it. */
export function brokenAreas({ series, limits }: Curves, points: readonly Points[], { time, value }: Plot): string[] {
  return limits.flatMap((limit) => {
    const index = series.findIndex(({ key }) => key === limit.series);
    if (index < 0 || limit.side === 0 || !limit.broken) return [];
    return piecesBeyond(points[index], limit.value, limit.side).map((piece) => {
      const x = piece.time.map((t) => time.at(clamp(t, limit.from, limit.to)));
      const y = piece.value.map((v) => value.at(v));
      return `${linePath(x, y)}Z`;
    });
  });
}

export interface Mark {
  key: string;
  x: number;
  y: number;
  up: boolean;
  text: string;
  /** Null where there is no clear room for the words. */
  place: TextPlace | null;
  bad: boolean;
}

interface MarkWords {
  kind: QuantityKind;
  system: UnitSystem;
  decimals: number;
}

/** The worst point beyond each broken limit; without any, the largest of the `peak` series. */
export function marksOf(
  curves: Curves,
  plot: Plot,
  drawn: DrawnCurves,
  limits: readonly LimitLine[],
  peak: string | undefined,
  words: MarkWords,
): Mark[] {
  const taken = limits.map(boxOfLimit);
  const mark = (key: string, word: string, at: { time: number; value: number }, up: boolean, limit: number | null): Mark => {
    const value = formatQuantity(at.value, words.kind, words.system, { decimals: words.decimals }).text;
    const text = `${word} ${value} at ${formatDuration(at.time)}`;
    const [x, y] = [plot.time.at(at.time), plot.value.at(at.value)];
    const beyond = limit === null ? y : plot.value.at(limit);
    const place = placePeakLabel(
      { x, y, up, beyond, right: plot.width },
      { width: textWidth(text), height: TEXT_HEIGHT },
      { ...drawn, taken },
    );
    return { key, x, y, up, text, place, bad: limit !== null };
  };
  const marks = curves.limits.flatMap((limit) => {
    const series = curves.series.find(({ key }) => key === limit.series);
    const at = series === undefined || !limit.broken ? null : worstBeyond(series.history, limit);
    return at === null ? [] : [mark(limit.requirement, 'worst', at, limit.side > 0, limit.value)];
  });
  const largest = curves.series.find(({ key }) => key === peak)?.history;
  const top = largest === undefined ? -1 : indexOfLargest(largest.value);
  if (marks.length === 0 && largest !== undefined && top >= 0 && largest.value[top] > 0) {
    marks.push(mark('peak', 'largest', { time: largest.time[top], value: largest.value[top] }, true, null));
  }
  return marks.filter(({ x }) => x >= 0 && x <= plot.width);
}

/** A letter on every curve that has one, clear of limits, words and each other. */
export function lettersOf(
  { series }: Curves,
  drawn: DrawnCurves,
  limits: readonly LimitLine[],
  marks: readonly Mark[],
): { item: Series; x: number; y: number }[] {
  const texts = [
    ...limits.map(boxOfLimit),
    ...marks.flatMap(({ text, place }) =>
      place === null ? [] : [boxOf(place, { width: textWidth(text), height: TEXT_HEIGHT })],
    ),
  ];
  const heights = limits.map(({ y }) => y);
  const places = placeLetters(drawn.columns, drawn.curves, heights, texts);
  return series.flatMap((item, index) => {
    const place = places[index];
    return item.letter === '' || place === null ? [] : [{ item, x: place.x, y: place.y }];
  });
}
