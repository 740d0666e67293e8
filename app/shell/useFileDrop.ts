/** A file dropped anywhere on the window is opened. */
import { onBeforeUnmount, onMounted, ref, type Ref } from 'vue';

export function useFileDrop(open: (file: File) => void, target: Window = window): { over: Ref<boolean> } {
  const over = ref(false);
  const holdsFile = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;

  function onOver(event: DragEvent): void {
    if (!holdsFile(event)) return;
    event.preventDefault();
    over.value = true;
  }
  function onLeave(event: DragEvent): void {
    if (event.relatedTarget === null) over.value = false;
  }
  function onDrop(event: DragEvent): void {
    over.value = false;
    if (!holdsFile(event)) return;
    event.preventDefault();
    const file = event.dataTransfer?.files[0];
    if (file !== undefined) open(file);
  }

  onMounted(() => {
    target.addEventListener('dragover', onOver);
    target.addEventListener('dragleave', onLeave);
    target.addEventListener('drop', onDrop);
  });
  onBeforeUnmount(() => {
    target.removeEventListener('dragover', onOver);
    target.removeEventListener('dragleave', onLeave);
    target.removeEventListener('drop', onDrop);
  });
  return { over };
}
