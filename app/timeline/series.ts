/** The curves and limits of the lanes, from the plan and its answers. Stored units: °C, K, s. */
import { type Answer, type LaidCycle, type Project, type Requirement } from '../../solver/model';
import { formatQuantity, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';
import type { Answered } from '../../solver/service/protocol';
import { seriesStyle, type History, type Scale, type SeriesStyle } from '../draw';
import { limitSign } from '../ui';

export interface Series {
  key: string;
  name: string;
  /** Rides on the curve; empty where a name at the left is enough. */
  letter: string;
  style: SeriesStyle;
  history: History;
  /** For a series of another kind than its lane: its unit and its own scale on the plot. */
  own?: { kind: QuantityKind; decimals: number; scale: Scale };
}

/** A limit of a requirement, as a line over the time in which it counts. */
export interface Limit {
  requirement: string;
  /** Key of the series that it limits; null for one that is not drawn. */
  series: string | null;
  value: number;
  from: number;
  to: number;
  text: string;
  /** The history may not go above (1) or below (−1) it; 0 where reaching it is enough. */
  side: 1 | -1 | 0;
  broken: boolean;
}

export interface Curves {
  series: Series[];
  limits: Limit[];
}

/** Probes in the order of the plan, and the coldest and hottest point where a requirement speaks of them. */
export function temperatureCurves(project: Project, laid: LaidCycle, result: Answered, system: UnitSystem): Curves {
  const series: Series[] = [];
  project.probes.forEach((probe, index) => {
    const history = result.probes.find((item) => item.probe === probe.id);
    if (history === undefined) return;
    const style = seriesStyle(index);
    const { time_s, temperature_C } = history;
    series.push({
      key: probe.id,
      name: probe.name,
      letter: style.letter,
      style,
      history: { time: time_s, value: temperature_C },
    });
  });
  for (const point of ['hottest', 'coldest'] as const) {
    if (!project.requirements.some(({ of }) => 'point' in of && of.point === point)) continue;
    const style = seriesStyle(series.length);
    const value = point === 'hottest' ? result.field.hottest_C : result.field.coldest_C;
    const name = point === 'hottest' ? 'Hottest point' : 'Coldest point';
    series.push({ key: point, name, letter: style.letter, style, history: { time: result.field.time_s, value } });
  }
  const limits = project.requirements
    .filter(({ of }) => !('difference' in of))
    .map((requirement) => limitOf(requirement, laid, result.answers, series, 'temperature', system));
  return { series, limits: apart(limits) };
}

/** Largest difference in the whole part, and within one material where that is another curve. */
export function differenceCurves(project: Project, laid: LaidCycle, result: Answered, system: UnitSystem): Curves {
  const { time_s, hottest_C, coldest_C, withinMaterial_K } = result.field;
  const whole = Float64Array.from(hottest_C, (hot, i) => hot - coldest_C[i]);
  const curve = (key: string, name: string, index: number, value: Float64Array): Series => ({
    key,
    name,
    letter: '',
    style: seriesStyle(index),
    history: { time: time_s, value },
  });
  const series = [curve('part', 'Whole part', 0, whole)];
  const materials = new Set(project.part.layers.map(({ material }) => material));
  if (materials.size > 1) series.push(curve('material', 'In one material', 1, withinMaterial_K));
  const asked = project.requirements.filter(({ of }) => 'difference' in of);
  const limits = asked.map((requirement) => limitOf(requirement, laid, result.answers, series, 'temperatureDifference', system));
  return { series, limits: apart(limits) };
}

function limitOf(
  requirement: Requirement,
  laid: LaidCycle,
  answers: readonly Answer[],
  series: readonly Series[],
  kind: QuantityKind,
  system: UnitSystem,
): Limit {
  const { of, must } = requirement;
  const asked = 'probe' in of ? of.probe : 'point' in of ? of.point : of.difference;
  // In a part of one material both differences are the same curve.
  const curve = series.find(({ key }) => key === asked) ?? ('difference' in of ? series[0] : undefined);
  const sign = limitSign(requirement);
  const [from, to] = countingWindow(requirement, laid);
  const answer = answers.find((item) => item.requirement === requirement.id);
  const held = must.kind === 'staysBelow' || must.kind === 'staysAbove';
  return {
    requirement: requirement.id,
    series: curve?.key ?? null,
    value: must.limit,
    from,
    to,
    text: `${curve?.letter ? `${curve.letter} ` : ''}${sign} ${formatQuantity(must.limit, kind, system).text}`,
    side: held ? (sign === '≤' ? 1 : -1) : 0,
    broken: held && answer !== undefined && answer.met === false,
  };
}

/** The cycle time in which a requirement counts, s. */
export function countingWindow({ counts }: Requirement, laid: LaidCycle): [number, number] {
  const stage = (id: string | undefined) => laid.stages.find((item) => item.id === id);
  switch (counts.kind) {
    case 'cycle':
      return [0, laid.end];
    case 'stage':
      return [stage(counts.stage)?.start ?? 0, stage(counts.stage)?.end ?? laid.end];
    case 'within': {
      const start = stage(counts.from)?.start ?? 0;
      return [start, Math.min(laid.end, start + counts.time)];
    }
    case 'stageEnd': {
      const end = stage(counts.stage)?.end ?? laid.end;
      return [end, end];
    }
  }
}

/** Limits that would lie on each other are drawn once, over all the time they cover. */
function apart(limits: readonly Limit[]): Limit[] {
  const out: Limit[] = [];
  for (const limit of limits) {
    const twin = out.find((other) => other.value === limit.value && other.text === limit.text && other.side === limit.side);
    if (twin === undefined) {
      out.push({ ...limit });
      continue;
    }
    twin.from = Math.min(twin.from, limit.from);
    twin.to = Math.max(twin.to, limit.to);
    twin.broken ||= limit.broken;
  }
  return out;
}

/** The worst point of a curve beyond a limit inside its window; null where it keeps it. */
export function worstBeyond({ time, value }: History, limit: Limit): { time: number; value: number } | null {
  let worst: { time: number; value: number } | null = null;
  for (let i = 0; i < time.length; i++) {
    if (time[i] < limit.from || time[i] > limit.to) continue;
    if (limit.side * (value[i] - limit.value) <= 0) continue;
    if (worst === null || limit.side * (value[i] - worst.value) > 0) worst = { time: time[i], value: value[i] };
  }
  return worst;
}
