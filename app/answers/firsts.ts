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
  /** Cycle time that a click goes to, s; null where nothing changes. */
  time_s: number | null;
}

/** Nearer to a face than this part of the thickness is said to be at it. */
const AT_FACE = 1e-6;

export function firstViews(first: FirstAnswers, project: Project, system: UnitSystem): FirstView[] {
  const { slowest, hottest, largestDifference, largestDifferenceInMaterial: within } = first;
  const views: FirstView[] = [
    slowest === null
      ? nothing('slow', 'Slowest point')
      : {
          icon: 'slow',
          label: 'Slowest point',
          figure: layerName(project, slowest.layer),
          beside: `at ${depthInWords(slowest.position_m, system)}`,
          below: `last to settle, ${formatDuration(slowest.time_s)}`,
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
          time_s: hottest.time_s,
        },
    differenceView('Largest difference', largestDifference, project, system),
  ];
  if (within !== null && largestDifference !== null && within.value_K < largestDifference.value_K * 0.999) {
    const material = orKind(project.materials.find((item) => item.id === within.material)?.name, 'one material');
    views.push({ ...differenceView('Within one material', within, project, system), beside: material });
  }
  return views;
}

const nothing = (icon: IconName, label: string): FirstView => ({
  icon,
  label,
  figure: '–',
  beside: '',
  below: 'nothing changes',
  time_s: null,
});

function differenceView(label: string, difference: LargestDifference | null, project: Project, system: UnitSystem): FirstView {
  if (difference === null) return nothing('gap', label);
  const [cold, hot] = difference.between.map((depth) => spotInWords(depth, project, system));
  return {
    icon: 'gap',
    label,
    figure: differenceInWords(difference.value_K, system),
    beside: `${hot} to ${cold}`,
    below: `at ${formatDuration(difference.time_s)}`,
    time_s: difference.time_s,
  };
}

/** "hot face", "120 mm deep". */
export function spotInWords(depth: number, project: Project, system: UnitSystem): string {
  const total = partThickness(project.part);
  const { start, end } = project.part.faces;
  if (depth <= total * AT_FACE) return orKind(start.name, 'start face');
  if (depth >= total * (1 - AT_FACE)) return orKind(end.name, 'end face');
  return depthInWords(depth, system);
}
