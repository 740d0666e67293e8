import { onScopeDispose, ref, watch, type Ref } from 'vue';

/** Width and height of an element's content box, px, followed as long as the scope lives; 0 until it is there. */
export function useSize(element: Ref<HTMLElement | null>): { width: Ref<number>; height: Ref<number> } {
  const width = ref(0);
  const height = ref(0);
  const observer =
    typeof ResizeObserver === 'undefined'
      ? null
      : new ResizeObserver(([entry]) => {
          width.value = Math.round(entry.contentRect.width);
          height.value = Math.round(entry.contentRect.height);
        });
  watch(
    element,
    (now, before) => {
      if (before) observer?.unobserve(before);
      if (!now) return;
      width.value = Math.round(now.clientWidth);
      height.value = Math.round(now.clientHeight);
      observer?.observe(now);
    },
    { immediate: true, flush: 'post' },
  );
  onScopeDispose(() => observer?.disconnect());
  return { width, height };
}
