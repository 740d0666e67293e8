/** F6: from panel to panel, to the thing in it that had the focus last. */

/** Moves the focus to the next panel (or the one before), in the order of the page. */
export function goToPanel(by: 1 | -1, root: Document = document): void {
  const panels = [...root.querySelectorAll<HTMLElement>('[data-panel]')].filter((panel) => panel.offsetParent !== null);
  if (panels.length === 0) return;
  const here = panels.findIndex((panel) => panel.contains(root.activeElement));
  const next = here < 0 ? (by > 0 ? 0 : panels.length - 1) : (here + by + panels.length) % panels.length;
  const inside = panels[next].querySelector<HTMLElement>(
    'td[tabindex="0"], [data-panel-focus], button:not(:disabled), input, select, [tabindex="0"]',
  );
  (inside ?? panels[next]).focus();
}
