/** What the person looks at and how: playhead, units, theme, selections. Nothing here is part of the plan. */
import { defineStore } from 'pinia';
import { computed, ref, watch } from 'vue';
import type { UnitSystem } from '../../solver/model/quantities';
import { onMedia, readPreferences, writePreferences } from './preferences';

export type Theme = 'system' | 'light' | 'dark' | 'contrast';

/** Tables of the sheet that can be closed to their heads. */
export type TableName = 'part' | 'materials' | 'probes' | 'exposure' | 'cycle' | 'requirements' | 'solver' | 'notes';

/** A place in the sheet to be shown and focused; `serial` makes a second wish for the same place a new one. */
export interface FocusWish {
  /** Path of the document, as `placeOf` words it. */
  place: string;
  serial: number;
}

export const useViewStore = defineStore('view', () => {
  const kept = readPreferences();
  /** Playhead, cycle time in s. */
  const time = ref(0);
  const playing = ref(false);
  /** Cycle seconds played in a second. */
  const speed = ref(kept.speed ?? 3600);
  const snap = ref(kept.snap ?? true);
  /** The part of the time axis that is shown, s. */
  const range = ref<[number, number]>([0, 1]);
  const show = ref<'cycle' | 'stage'>('cycle');
  const units = ref<UnitSystem>(kept.units ?? 'SI');
  const theme = ref<Theme>(kept.theme ?? 'system');
  const selectedStage = ref<string | null>(null);
  const selectedProbe = ref<string | null>(null);
  const selectedLayer = ref<string | null>(null);
  const selectedRequirement = ref<string | null>(null);
  const profile = ref<'temperature' | 'flux'>('temperature');
  /** Tables that the person opened or closed; absent: as the window's height suggests. */
  const tables = ref<Partial<Record<TableName, boolean>>>(kept.tables ?? {});
  const shortWindow = onMedia('(max-height: 799px)');
  const openAtFirst: Record<TableName, boolean> = {
    part: true,
    materials: false,
    probes: false,
    exposure: true,
    cycle: false,
    requirements: true,
    solver: false,
    notes: false,
  };
  /** A short window closes the requirements to their summary: their verdicts stand in the strip above. */
  const isOpen = (name: TableName): boolean =>
    tables.value[name] ?? (openAtFirst[name] && !(name === 'requirements' && shortWindow.value));
  const setOpen = (name: TableName, open: boolean): void => void (tables.value = { ...tables.value, [name]: open });
  /** Height of the work area and width of the sheet, px; null: as the window suggests. */
  const workHeight = ref<number | null>(kept.workHeight ?? null);
  const sheetWidth = ref<number | null>(kept.sheetWidth ?? null);
  const focusWish = ref<FocusWish | null>(null);

  const systemDark = onMedia('(prefers-color-scheme: dark)');
  const systemContrast = onMedia('(prefers-contrast: more)');
  /** The look in force; drawings read their colours again when it changes. */
  const look = computed(() => {
    if (theme.value !== 'system') return theme.value;
    return systemContrast.value ? 'contrast' : systemDark.value ? 'dark' : 'light';
  });

  let cycleEnd = 1;
  /** Follows a change of the cycle's length: a whole view stays whole, playhead and range stay inside. */
  function fitTo(end: number): void {
    const whole = range.value[0] === 0 && range.value[1] === cycleEnd;
    const [from, to] = range.value;
    cycleEnd = end;
    range.value = whole || from >= end ? [0, end] : [from, Math.min(to, end)];
    time.value = Math.min(time.value, end);
  }

  /** Back to the start for another document. */
  function reset(): void {
    time.value = 0;
    playing.value = false;
    range.value = [0, cycleEnd];
    show.value = 'cycle';
    selectedStage.value = null;
    selectedProbe.value = null;
    selectedLayer.value = null;
    selectedRequirement.value = null;
  }

  /** Asks the sheet to open the table that holds a place and to focus its field. */
  function focusOn(place: string): void {
    focusWish.value = { place, serial: (focusWish.value?.serial ?? 0) + 1 };
  }

  watch(
    [units, theme, speed, snap, tables, workHeight, sheetWidth],
    () =>
      writePreferences({
        units: units.value,
        theme: theme.value,
        speed: speed.value,
        snap: snap.value,
        tables: tables.value,
        workHeight: workHeight.value,
        sheetWidth: sheetWidth.value,
      }),
    { deep: true },
  );

  return {
    time,
    playing,
    speed,
    snap,
    range,
    show,
    units,
    theme,
    look,
    selectedStage,
    selectedProbe,
    selectedLayer,
    selectedRequirement,
    profile,
    tables,
    isOpen,
    setOpen,
    workHeight,
    sheetWidth,
    focusWish,
    fitTo,
    reset,
    focusOn,
  };
});
