/** The first answers in words: figure, what and where beside it, when below. */
import { depthInWords, differenceInWords, layerName, orKind, temperatureInWords, type IconName } from '../ui';
import { partThickness, type FirstAnswers, type LargestDifference, type Project } from '../../solver/model';
import { formatDuration, type UnitSystem } from '../../solver/model/quantities';

export interface FirstView {
  icon: IconName;
  label: string;
  figure: string;
  beside: string;
  below: string;
  /** More, under the pointer. */
  hint: string;
  /** Cycle time that a click goes to, s; null where nothing changes. */
  time_s: number | null;
}

/** Nearer to a face than this part of the thickness is said to be at it. */
const AT_FACE = 1e-6;

export function firstViews(first: FirstAnswers, project: Project, system: UnitSystem): FirstView[] {
  const { slowest, hottest, largestDifference, largestDifferenceInMaterial: within } = first;
  return [
    slowest === null
      ? nothing('slow', 'Slowest point')
      : {
          icon: 'slow',
          label: 'Slowest point',
          figure: layerName(project, slowest.layer),
          beside: `at ${depthInWords(slowest.position_m, system)}`,
          below: `last to settle, ${formatDuration(slowest.time_s)}`,
          hint: '',
          time_s: slowest.time_s,
        },
    hottest === null
      ? nothing('hot', 'Hottest point')
      : {
          icon: 'hot',
          label: 'Hottest point',
          figure: temperatureInWords(hottest.temperature_C, system),
          beside: spotInWords(hottest.position_m, project, system),
          below: `at ${formatDuration(hottest.time_s)}`,
          hint: '',
          time_s: hottest.time_s,
        },
    largestDifference === null
      ? nothing('gap', 'Largest difference')
      : differenceView(largestDifference, within, project, system),
  ];
}

const nothing = (icon: IconName, label: string): FirstView => ({
  icon,
  label,
  figure: '–',
  beside: '',
  below: 'nothing changes',
  hint: '',
  time_s: null,
});

/** In the whole part; and within one material, which is the one a planner limits, where that is another. */
function differenceView(
  difference: LargestDifference,
  within: FirstAnswers['largestDifferenceInMaterial'],
  project: Project,
  system: UnitSystem,
): FirstView {
  const view = { icon: 'gap' as const, label: 'Largest difference', time_s: difference.time_s };
  const figure = differenceInWords(difference.value_K, system);
  const when = `at ${formatDuration(difference.time_s)}`;
  const between = betweenInWords(difference, project, system);
  if (within === null || within.value_K > difference.value_K * 0.999) {
    return { ...view, figure, beside: between, below: when, hint: '' };
  }
  const inOne = differenceInWords(within.value_K, system);
  const material = orKind(project.materials.find((item) => item.id === within.material)?.name, 'one material');
  const spot = betweenInWords(within, project, system);
  const hint = `${between}. Within one material ${inOne}, ${material}, ${spot}, at ${formatDuration(within.time_s)}`;
  return { ...view, figure, beside: when, below: `in one material ${inOne}`, hint };
}

function betweenInWords({ between }: LargestDifference, project: Project, system: UnitSystem): string {
  const [cold, hot] = between.map((depth) => spotInWords(depth, project, system));
  return `${hot} to ${cold}`;
}

/** "hot face", "120 mm deep". */
export function spotInWords(depth: number, project: Project, system: UnitSystem): string {
  const total = partThickness(project.part);
  const { start, end } = project.part.faces;
  if (depth <= total * AT_FACE) return orKind(start.name, 'start face');
  if (depth >= total * (1 - AT_FACE)) return orKind(end.name, 'end face');
  return depthInWords(depth, system);
}
