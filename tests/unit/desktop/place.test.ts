import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { keepPlace, readPlace, usablePlace } from '../../../main/desktop/place';

const SCREENS = [
  { x: 0, y: 24, width: 1920, height: 1056 },
  { x: 1920, y: 0, width: 1280, height: 1024 },
];
const at = (x: number, y: number, width = 1000, height = 700) => ({ x, y, width, height, maximized: false });

describe('the place of the window', () => {
  it('is used again on whichever screen still shows its title bar', () => {
    expect(usablePlace(at(100, 100), SCREENS)).toEqual(at(100, 100));
    expect(usablePlace(at(2000, 10), SCREENS)).toEqual(at(2000, 10));
    expect(usablePlace(at(-900, 100), SCREENS)).toEqual(at(-900, 100)); // 100 px still show
  });

  it('is not used when its screen is gone or its title bar out of reach', () => {
    expect(usablePlace(at(2000, 10), SCREENS.slice(0, 1))).toBeNull();
    expect(usablePlace(at(-950, 100), SCREENS)).toBeNull();
    expect(usablePlace(at(100, 0), SCREENS)).toBeNull(); // under the bar at the top
    expect(usablePlace(at(100, 1050), SCREENS.slice(0, 1))).toBeNull();
  });

  it('is never smaller than the window may be', () => {
    expect(usablePlace(at(0, 24, 10, 10), SCREENS)).toBeNull();
    expect(usablePlace(at(0, 24, 200, 200), SCREENS)).toMatchObject({ width: 640, height: 480 });
  });

  it('is not believed when it is damaged', () => {
    for (const damaged of [undefined, null, 'left', { x: 1 }, { ...at(1, 30), width: null }, { ...at(1, 30), maximized: 1 }]) {
      expect(usablePlace(damaged, SCREENS)).toBeNull();
    }
  });

  it('is read back as it was kept, and a missing or torn file is nothing', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'soakwright-place-'));
    const store = join(folder, 'window.json');
    expect(readPlace(store)).toBeUndefined();
    await keepPlace(store, at(5, 30));
    expect(usablePlace(readPlace(store), SCREENS)).toEqual(at(5, 30));
    await writeFile(store, '{"x":');
    expect(readPlace(store)).toBeUndefined();
    await rm(folder, { recursive: true });
  });
});
