/**
 * A picture of what is drawn on screen: canvases, SVG shapes and text of an element, painted again at twice the size.
 *
 * The elements themselves are read, not a serialised copy, so that fonts and colours are those on screen. Only what our
 * drawings use is painted: lines, rectangles, circles, paths, text, patterns, plain boxes; anything marked
 * data-picture="skip" is left out.
 */
import { saveBlob } from './saveFile';

const SCALE = 2;

/** Saves an element as a PNG file. */
export async function savePicture(element: HTMLElement, name: string): Promise<void> {
  const { width, height } = element.getBoundingClientRect();
  const canvas = document.createElement('canvas');
  canvas.width = Math.ceil(width * SCALE);
  canvas.height = Math.ceil(height * SCALE);
  const context = canvas.getContext('2d');
  if (context === null) return;
  paintPicture(element, context);
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
  if (blob !== null) saveBlob(blob, name);
}

/** Paints an element with everything in it, its corner at the origin. */
export function paintPicture(element: HTMLElement, context: CanvasRenderingContext2D): void {
  const corner = element.getBoundingClientRect();
  context.scale(SCALE, SCALE);
  context.fillStyle = getComputedStyle(element).getPropertyValue('--panel') || '#fff';
  context.fillRect(0, 0, corner.width, corner.height);
  context.translate(-corner.left, -corner.top);
  paint(element, context, 1);
}

function paint(element: Element, context: CanvasRenderingContext2D, alphaAbove: number): void {
  if (element.getAttribute('data-picture') === 'skip') return;
  const style = getComputedStyle(element);
  if (style.display === 'none' || style.visibility === 'hidden') return;
  const alpha = alphaAbove * Number(style.opacity || 1);
  if (alpha === 0) return;
  context.save();
  context.globalAlpha = alpha;
  if (element instanceof HTMLCanvasElement) paintCanvas(element, context);
  else if (element instanceof SVGGeometryElement) paintShape(element, style, context, alpha);
  else if (element instanceof HTMLElement) paintBox(element, style, context);
  if (!(element instanceof SVGDefsElement)) {
    if (style.overflow === 'hidden' && !(element instanceof SVGGElement)) clipTo(element, context);
    for (const child of element.childNodes) {
      if (child instanceof Element) paint(child, context, alpha);
      else if (child instanceof Text) paintText(child, style, context, alpha);
    }
  }
  context.restore();
}

function clipTo(element: Element, context: CanvasRenderingContext2D): void {
  const { left, top, width, height } = element.getBoundingClientRect();
  context.beginPath();
  context.rect(left, top, width, height);
  context.clip();
}

function paintCanvas(canvas: HTMLCanvasElement, context: CanvasRenderingContext2D): void {
  const { left, top, width, height } = canvas.getBoundingClientRect();
  if (canvas.width > 0 && canvas.height > 0) context.drawImage(canvas, left, top, width, height);
}

const SEEN = /^(?!none|transparent|rgba\(0, 0, 0, 0\))/;

function paintShape(
  shape: SVGGeometryElement,
  style: CSSStyleDeclaration,
  context: CanvasRenderingContext2D,
  alpha: number,
): void {
  const matrix = shape.getScreenCTM();
  if (matrix === null) return;
  context.save();
  context.transform(matrix.a, matrix.b, matrix.c, matrix.d, matrix.e, matrix.f);
  const path = pathOf(shape);
  const fill = fillOf(style.fill, context);
  if (fill !== null) {
    context.globalAlpha = alpha * Number(style.fillOpacity || 1);
    context.fillStyle = fill;
    context.fill(path);
  }
  if (SEEN.test(style.stroke)) {
    context.globalAlpha = alpha * Number(style.strokeOpacity || 1);
    context.strokeStyle = style.stroke;
    context.lineWidth = Number.parseFloat(style.strokeWidth);
    context.lineJoin = style.strokeLinejoin as CanvasLineJoin;
    context.setLineDash(style.strokeDasharray === 'none' ? [] : style.strokeDasharray.split(',').map(Number.parseFloat));
    context.stroke(path);
  }
  context.restore();
}

function pathOf(shape: SVGGeometryElement): Path2D {
  const number = (name: string): number => Number(shape.getAttribute(name) ?? 0);
  const path = new Path2D(shape instanceof SVGPathElement ? (shape.getAttribute('d') ?? '') : undefined);
  if (shape instanceof SVGLineElement) {
    path.moveTo(number('x1'), number('y1'));
    path.lineTo(number('x2'), number('y2'));
  } else if (shape instanceof SVGRectElement) {
    path.roundRect(number('x'), number('y'), number('width'), number('height'), number('rx'));
  } else if (shape instanceof SVGCircleElement) {
    path.arc(number('cx'), number('cy'), number('r'), 0, 2 * Math.PI);
  }
  return path;
}

function fillOf(fill: string, context: CanvasRenderingContext2D): string | CanvasPattern | null {
  const reference = /^url\("?#([^")]+)"?\)/.exec(fill);
  if (reference === null) return SEEN.test(fill) ? fill : null;
  const pattern = document.getElementById(reference[1]);
  return pattern instanceof SVGPatternElement ? tileOf(pattern, context) : null;
}

function tileOf(pattern: SVGPatternElement, context: CanvasRenderingContext2D): CanvasPattern | null {
  const tile = document.createElement('canvas');
  tile.width = pattern.width.baseVal.value * SCALE;
  tile.height = pattern.height.baseVal.value * SCALE;
  const inside = tile.getContext('2d');
  if (inside === null) return null;
  inside.scale(SCALE, SCALE);
  for (const shape of pattern.children) {
    if (!(shape instanceof SVGGeometryElement)) continue;
    const style = getComputedStyle(shape);
    inside.globalAlpha = Number(style.opacity || 1);
    const path = pathOf(shape);
    if (SEEN.test(style.fill)) {
      inside.fillStyle = style.fill;
      inside.fill(path);
    }
    if (!SEEN.test(style.stroke)) continue;
    inside.strokeStyle = style.stroke;
    inside.lineWidth = Number.parseFloat(style.strokeWidth);
    inside.stroke(path);
  }
  const tiles = context.createPattern(tile, 'repeat');
  const turned = pattern.patternTransform.baseVal.consolidate()?.matrix;
  const matrix = new DOMMatrix(turned ? [turned.a, turned.b, turned.c, turned.d, turned.e, turned.f] : undefined);
  tiles?.setTransform(matrix.scale(1 / SCALE));
  return tiles;
}

function paintBox(element: HTMLElement, style: CSSStyleDeclaration, context: CanvasRenderingContext2D): void {
  const { left, top, width, height } = element.getBoundingClientRect();
  const radius = Number.parseFloat(style.borderTopLeftRadius) || 0;
  context.beginPath();
  context.roundRect(left, top, width, height, Math.min(radius, height / 2));
  if (SEEN.test(style.backgroundColor)) {
    context.fillStyle = style.backgroundColor;
    context.fill();
  }
  const edge = Number.parseFloat(style.borderTopWidth);
  const around = edge > 0 && Number.parseFloat(style.borderLeftWidth) > 0;
  if (around && SEEN.test(style.borderTopColor)) {
    context.strokeStyle = style.borderTopColor;
    context.lineWidth = edge;
    context.stroke();
  } else if (edge > 0 && SEEN.test(style.borderTopColor)) {
    context.fillStyle = style.borderTopColor;
    context.fillRect(left, top, width, edge);
  }
}

function paintText(node: Text, style: CSSStyleDeclaration, context: CanvasRenderingContext2D, alpha: number): void {
  const text = node.data.replace(/\s+/g, ' ').trim();
  if (text === '') return;
  const range = document.createRange();
  range.selectNodeContents(node);
  const place = range.getClientRects()[0];
  if (place === undefined) return;
  context.globalAlpha = alpha;
  context.font = `${style.fontWeight} ${style.fontSize} ${style.fontFamily}`;
  context.textBaseline = 'alphabetic';
  const { fontBoundingBoxAscent: up, fontBoundingBoxDescent: down } = context.measureText(text);
  const baseline = place.top + (place.height + up - down) / 2;
  const inSvg = node.parentElement instanceof SVGElement;
  if (inSvg && style.paintOrder.startsWith('stroke') && SEEN.test(style.stroke)) {
    context.strokeStyle = style.stroke;
    context.lineWidth = Number.parseFloat(style.strokeWidth);
    context.lineJoin = 'round';
    context.strokeText(text, place.left, baseline);
  }
  context.fillStyle = inSvg ? style.fill : style.color;
  context.fillText(text, place.left, baseline);
}
