/** Edits of the heat given off inside the layers during a stage. */
import type { Layer, PlainSchedule, Source, Stage } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, indexOfId, writeAt } from './edit';
import { changeStage } from './stages';

/** The stage without a source in that layer. */
export function withoutSource(stage: Stage, layer: string): Stage {
  if (!stage.sources?.some((source) => source.layer === layer)) return stage;
  const { sources, ...rest } = stage;
  const left = sources.filter((source) => source.layer !== layer);
  return left.length === 0 ? rest : { ...rest, sources: left };
}

/** The power of a source of its own kind of writing: a number (W/m³), ramps, an expression of T, x, t and clock; null: none. */
export const setSource = (stage: Stage, layer: Layer, power: Source['power'] | null, text: string): Command => ({
  name: `Heat source in ${called(layer, 'layer')} during ${called(stage, 'stage')}: ${text}`,
  apply: (project) =>
    changeStage(project, stage, (item) => {
      if (power === null) return withoutSource(item, layer.id);
      const sources = item.sources ?? [];
      const index = sources.findIndex((source) => source.layer === layer.id);
      if (index < 0) return { ...item, sources: [...sources, { layer: layer.id, power }] };
      return writeAt(item, ['sources', index, 'power'], power);
    }),
});

/** The number of a constant source, W/m³. */
export const setSourceNumber = (stage: Stage, layer: Layer, entered: Entered): Command => ({
  name: `Heat source in ${called(layer, 'layer')} during ${called(stage, 'stage')} to ${entered.text}`,
  apply: (project) => {
    const at = indexOfId(project.cycle.stages, stage.id);
    const index = project.cycle.stages[at]?.sources?.findIndex((source) => source.layer === layer.id) ?? -1;
    return index < 0 ? project : enterAt(project, ['cycle', 'stages', at, 'sources', index, 'power'], entered);
  },
});

/** The source of a layer in a stage; null where there is none. */
export const sourceOf = (stage: Stage, layer: string): PlainSchedule | null =>
  stage.sources?.find((source) => source.layer === layer)?.power ?? null;
