/** The stage that the tables speak of: the chosen one, or the first. */
import { computed, type ComputedRef } from 'vue';
import { useProjectStore, useViewStore } from '../stores';
import type { Stage } from '../../solver/model';

export function useStage(): { stage: ComputedRef<Stage>; index: ComputedRef<number> } {
  const project = useProjectStore();
  const view = useViewStore();
  const index = computed(() =>
    Math.max(
      0,
      project.current.cycle.stages.findIndex((stage) => stage.id === view.selectedStage),
    ),
  );
  return { stage: computed(() => project.current.cycle.stages[index.value]), index };
}
