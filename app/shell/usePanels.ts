/** F6: from panel to panel, to the thing in it that had the focus last. */

const lastIn = new WeakMap<Element, HTMLElement>();

/** Moves the focus to the next panel (or the one before), in the order of the page. */
export function goToPanel(by: 1 | -1, root: Document = document): void {
  const panels = [...root.querySelectorAll<HTMLElement>('[data-panel]')].filter((panel) => panel.offsetParent !== null);
  if (panels.length === 0) return;
  const { activeElement } = root;
  const here = panels.findIndex((panel) => panel.contains(activeElement));
  if (here >= 0 && activeElement instanceof HTMLElement) lastIn.set(panels[here], activeElement);
  const next = panels[here < 0 ? (by > 0 ? 0 : panels.length - 1) : (here + by + panels.length) % panels.length];
  const last = lastIn.get(next);
  (last && next.contains(last) ? last : firstIn(next)).focus();
}

/** A table's cell rather than the button in its head. */
const firstIn = (panel: HTMLElement): HTMLElement =>
  panel.querySelector<HTMLElement>('td[tabindex="0"]') ??
  panel.querySelector<HTMLElement>('button:not(:disabled), input, select, [tabindex="0"]') ??
  panel;
