/**
 * Writing straight into the page what changes with every frame of an animation. Called from a watchPostEffect: the effect
 * follows what it reads, and no component is rendered again.
 */

type Target<T> = T | null | undefined;

/** Moves an element from its place in the layout, which stays as it is. */
export function moveTo(element: Target<HTMLElement | SVGElement>, x: number, y: number): void {
  const transform = `translate(${x}px, ${y}px)`;
  if (element && element.style.transform !== transform) element.style.transform = transform;
}

/** Replaces the text of an element that holds nothing else. */
export function writeText(element: Target<Element>, text: string): void {
  const node = element?.firstChild;
  if (node instanceof Text) {
    if (node.data !== text) node.data = text;
  } else if (element) {
    element.textContent = text;
  }
}

/** Sets an attribute where it differs. */
export function writeAttribute(element: Target<Element>, name: string, value: string): void {
  if (element && element.getAttribute(name) !== value) element.setAttribute(name, value);
}

/** Shows or hides an element, keeping its room. */
export function showIf(element: Target<HTMLElement | SVGElement>, shows: boolean): void {
  const visibility = shows ? '' : 'hidden';
  if (element && element.style.visibility !== visibility) element.style.visibility = visibility;
}
