/** Preferences kept between starts. Storage may be switched off or hold anything: then the defaults serve. */
import { onScopeDispose, ref, type Ref } from 'vue';
import { z } from 'zod';

const KEY = 'soakwright.view';

const preferencesSchema = z
  .object({
    units: z.enum(['SI', 'US']),
    theme: z.enum(['system', 'light', 'dark', 'contrast']),
    speed: z.number().positive(),
    snap: z.boolean(),
    tables: z.partialRecord(
      z.enum(['part', 'materials', 'probes', 'exposure', 'cycle', 'requirements', 'solver', 'notes']),
      z.boolean(),
    ),
    workHeight: z.number().nullable(),
    sheetWidth: z.number().nullable(),
  })
  .partial();

export type Preferences = z.infer<typeof preferencesSchema>;

export function readPreferences(): Preferences {
  try {
    const read = preferencesSchema.safeParse(JSON.parse(localStorage.getItem(KEY) ?? '{}'));
    return read.success ? read.data : {};
  } catch {
    return {};
  }
}

export function writePreferences(preferences: Preferences): void {
  try {
    localStorage.setItem(KEY, JSON.stringify(preferences));
  } catch {
    // Without storage the preferences last as long as the window.
  }
}

/** Whether a media query holds, followed as long as the scope lives. */
export function onMedia(query: string): Ref<boolean> {
  const list = typeof matchMedia === 'function' ? matchMedia(query) : null;
  const holds = ref(list?.matches ?? false);
  const update = (event: MediaQueryListEvent): void => void (holds.value = event.matches);
  list?.addEventListener?.('change', update);
  onScopeDispose(() => list?.removeEventListener?.('change', update), true);
  return holds;
}
