/** Where the window stood: remembered, and used again only if it is still on a screen. */
import { readFileSync } from 'node:fs';
import { saveText } from '../files';

export interface Place {
  x: number;
  y: number;
  width: number;
  height: number;
}
export interface KeptPlace extends Place {
  maximized: boolean;
}

const SMALLEST = { width: 640, height: 480 };
/** So much of the title bar must lie on a screen for a hand to take it. */
const GRIP = 80;

/** The remembered place, if one of the screens' work areas still shows enough of it. */
export function usablePlace(kept: unknown, screens: readonly Place[]): KeptPlace | null {
  if (!isPlace(kept)) return null;
  const held = screens.some(
    (screen) =>
      kept.x + kept.width - GRIP >= screen.x &&
      kept.x + GRIP <= screen.x + screen.width &&
      kept.y >= screen.y &&
      kept.y + GRIP <= screen.y + screen.height,
  );
  if (!held) return null;
  return { ...kept, width: Math.max(kept.width, SMALLEST.width), height: Math.max(kept.height, SMALLEST.height) };
}

function isPlace(kept: unknown): kept is KeptPlace {
  if (typeof kept !== 'object' || kept === null) return false;
  const { x, y, width, height, maximized } = kept as KeptPlace;
  return [x, y, width, height].every(Number.isFinite) && typeof maximized === 'boolean';
}

/** Whatever the file at `store` holds; undefined where it cannot be read. */
export function readPlace(store: string): unknown {
  try {
    return JSON.parse(readFileSync(store, 'utf8'));
  } catch {
    return undefined;
  }
}

export async function keepPlace(store: string, place: KeptPlace): Promise<void> {
  await saveText(store, `${JSON.stringify(place)}\n`);
}
