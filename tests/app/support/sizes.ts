/** A page without layout gives every element no size: this gives all of them one, for drawings that fill their place. */
import { vi } from 'vitest';

export function giveSize(width: number, height: number): void {
  vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(width);
  vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(height);
}
