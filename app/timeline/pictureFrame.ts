import type { InjectionKey } from 'vue';

/** What frames the picture of a lane: rows above it, and rows below. */
export interface PictureFrame {
  above(): HTMLElement[][];
  below(): HTMLElement[][];
}

export const pictureFrame: InjectionKey<PictureFrame> = Symbol('picture frame');
