/** Names and thicknesses over the layers: as much of them as each has room for. */
import { textWidth } from '../draw';

export interface Caption {
  layer: number;
  name: string;
  thickness: string;
  /** Middle of the text, px; where it begins for one that leans out over the end. */
  x: number;
  anchor: 'middle' | 'start';
  /** Room for dimension lines on both sides. */
  airy: boolean;
}

export interface CaptionLayer {
  name: string;
  thickness: string;
  left: number;
  right: number;
}

const SIZE = 11.5;
const AIR = 8;
/** Dimension lines are drawn beside a text with this much room on both sides, px. */
const AIRY = 36;

/**
 * One caption a layer at most: name and thickness, the name, the thickness, or its number; none where not even that fits.
 * The last layer may lean out over the end of the part by `overhang` pixels.
 */
export function captionsOf(layers: readonly CaptionLayer[], overhang: number): Caption[] {
  return layers.flatMap(({ name, thickness, left, right }, layer): Caption[] => {
    const room = right - left;
    const texts = [
      { name, thickness },
      { name, thickness: '' },
      { name: '', thickness },
      { name: layers.length > 3 ? String(layer + 1) : '', thickness: '' },
    ].filter((text) => text.name !== '' || text.thickness !== '');
    const widthOf = (text: { name: string; thickness: string }): number =>
      textWidth(`${text.name}${text.name && text.thickness ? '  ' : ''}${text.thickness}`, SIZE);
    const leans = layer === layers.length - 1 && widthOf(texts[0]) <= room + overhang;
    const fits = texts.find((text) => widthOf(text) + AIR <= room);
    if (fits?.name === name && (fits.thickness === thickness || !leans)) {
      return [{ layer, ...fits, x: (left + right) / 2, anchor: 'middle', airy: room - widthOf(fits) > 2 * AIRY }];
    }
    if (leans) {
      return [{ layer, ...texts[0], x: left + 4, anchor: 'start', airy: false }];
    }
    return fits === undefined ? [] : [{ layer, ...fits, x: (left + right) / 2, anchor: 'middle', airy: false }];
  });
}
