import type { MenuItemConstructorOptions } from 'electron';
import { describe, expect, it } from 'vitest';
import { menuTemplate } from '../../../main/desktop/menu';

const PLATFORMS = ['linux', 'win32', 'darwin'] as const;

function itemsOf(platform: NodeJS.Platform) {
  const chosen: string[] = [];
  const actions = { command: (name: string) => void chosen.push(name), forgetRecentFiles: () => void chosen.push('(forget)') };
  const flatten = (items: MenuItemConstructorOptions[]): MenuItemConstructorOptions[] =>
    items.flatMap((item) => [item, ...(Array.isArray(item.submenu) ? flatten(item.submenu) : [])]);
  return { items: flatten(menuTemplate(platform, actions)), chosen };
}
const click = (item: MenuItemConstructorOptions | undefined): void => (item?.click as (() => void) | undefined)?.();

describe.each(PLATFORMS)('the menu on %s', (platform) => {
  it('has no accelerator twice', () => {
    const keys = itemsOf(platform).items.flatMap((item) => item.accelerator ?? []);
    expect(keys.length).toBeGreaterThan(5);
    expect(new Set(keys).size).toBe(keys.length);
  });

  it('hands every command to the page by one name', () => {
    const { items, chosen } = itemsOf(platform);
    const commands = items.filter((item) => item.click !== undefined);
    commands.forEach(click);
    expect(new Set(chosen).size).toBe(commands.length);
    expect(chosen).toEqual(expect.arrayContaining(['new', 'open', 'save', 'save-as', 'undo', 'redo', 'shortcuts', '(forget)']));
  });

  it('has a label or a role on everything that is not a separator', () => {
    for (const item of itemsOf(platform).items) expect(item.label ?? item.role ?? item.type).toBeTruthy();
  });
});

describe('the menus of the platforms', () => {
  it('follow their own manners', () => {
    const keysOf = (platform: NodeJS.Platform, label: string) =>
      itemsOf(platform).items.find((item) => item.label === label)?.accelerator;
    expect(keysOf('darwin', '&Redo')).toBe('Shift+Cmd+Z');
    expect(keysOf('linux', '&Redo')).toBe('Ctrl+Y');
    const rolesOf = (platform: NodeJS.Platform) => itemsOf(platform).items.map((item) => item.role);
    expect(rolesOf('darwin')).toContain('appMenu');
    expect(rolesOf('linux')).not.toContain('appMenu');
    expect(rolesOf('linux')).toContain('quit');
  });
});
