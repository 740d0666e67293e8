import { onScopeDispose, readonly, ref, watch, type Ref } from 'vue';

/** True once a condition has held for a while; false at once when it ends. */
export function useDelayed(condition: () => boolean, delayMs: number): Readonly<Ref<boolean>> {
  const holds = ref(false);
  let timer: ReturnType<typeof setTimeout> | undefined;
  watch(
    condition,
    (now) => {
      clearTimeout(timer);
      if (now) timer = setTimeout(() => (holds.value = true), delayMs);
      else holds.value = false;
    },
    { immediate: true },
  );
  onScopeDispose(() => clearTimeout(timer));
  return readonly(holds);
}
