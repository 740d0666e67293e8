import { mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import { addLayer, applyCommand, nextLayer, type Command } from '../../../app/commands';
import { layerColumns, layerRows } from '../../../app/part/layerRows';
import EditableTable from '../../../app/ui/grid/EditableTable.vue';
import { problemsIn } from '../../../app/stores';
import { placeOf, type Project } from '../../../solver/model';
import { lining } from '../support/lining';

/** The table of the layers, with a plan that follows its edits. */
function open(start: Project = lining()) {
  let plan = start;
  let draft: Project | null = null;
  const names: string[] = [];
  const table = mount(EditableTable, {
    attachTo: document.body,
    props: {
      title: 'Part',
      closable: true,
      summary: '3 layers',
      columns: layerColumns('SI'),
      project: plan,
      rowsOf: (project: Project) => layerRows(project, () => undefined),
      system: 'SI',
      add: (project: Project) => addLayer(nextLayer(project, project.part.layers.length - 1), project.part.layers.length - 1),
      problemAt: (path) => problemsIn(draft ?? plan).find((problem) => placeOf(problem.path) === placeOf(path))?.message,
      onCommit: (command: Command) => {
        plan = applyCommand(plan, command);
        draft = null;
        names.push(command.name);
        void table.setProps({ project: plan });
      },
      onDraft: (command: Command) => {
        draft = applyCommand(plan, command);
        void table.setProps({ project: draft });
      },
      onDrop: () => {
        draft = null;
        void table.setProps({ project: plan });
      },
    },
  });
  const cell = (row: number, column: number) => table.get(`[data-row="${row}"][data-column="${column}"]`);
  const settle = async () => {
    await nextTick();
    await nextTick();
  };
  return {
    table,
    cell,
    plan: () => plan,
    names,
    /** Presses a key where the focus is. */
    async press(key: string, more: KeyboardEventInit = {}) {
      document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
      await settle();
    },
    async at(row: number, column: number) {
      (cell(row, column).element as HTMLElement).focus();
      await settle();
    },
    async type(text: string) {
      const input = table.get('.cell-editor input');
      await input.setValue(text);
    },
    here: () => {
      const { row, column } = (document.activeElement as HTMLElement).dataset;
      return [Number(row), Number(column)];
    },
  };
}

afterEach(() => {
  document.body.innerHTML = '';
});

describe('moving', () => {
  it('is done with the arrows from one tab stop', async () => {
    const { table, at, press, here } = open();
    expect(table.findAll('td[tabindex="0"]')).toHaveLength(1);
    await at(0, 0);
    await press('ArrowRight');
    await press('ArrowRight');
    await press('ArrowDown');
    expect(here()).toEqual([1, 2]);
    expect(table.findAll('td[tabindex="0"]')).toHaveLength(1);
  });

  it('stops at the edges; Home and End go to them', async () => {
    const { at, press, here } = open();
    await at(0, 0);
    await press('ArrowUp');
    await press('ArrowLeft');
    expect(here()).toEqual([0, 0]);
    await press('End');
    expect(here()).toEqual([0, 4]);
    await press('End', { ctrlKey: true });
    expect(here()).toEqual([2, 4]);
    await press('Home');
    expect(here()).toEqual([2, 0]);
  });
});

describe('editing', () => {
  it('begins with Enter, keeps with Enter, and stays on the cell', async () => {
    const { at, press, type, plan, here, names } = open();
    await at(1, 2);
    await press('Enter');
    await type('3 in');
    await press('Enter');
    expect(plan().part.layers[1].thickness).toBe(0.0762);
    expect(plan().typed).toEqual({ 'part.layers[1].thickness': '3 in' });
    expect(names).toEqual(['Thickness of Backing to 76.2 mm']);
    expect(here()).toEqual([1, 2]);
  });

  it('shows a trial in the other cells, and Esc takes it back', async () => {
    const { table, at, press, type, plan, here } = open();
    await at(1, 2);
    await press('F2');
    await type('3 in');
    expect(table.props('project').part.layers[1].thickness).toBe(0.0762);
    await press('Escape');
    expect(table.props('project')).toBe(plan());
    expect(plan().part.layers[1].thickness).toBe(0.075);
    expect(here()).toEqual([1, 2]);
  });

  it('begins with the key that was struck', async () => {
    const { table, at, press } = open();
    await at(0, 2);
    await press('9');
    expect((table.get('.cell-editor input').element as HTMLInputElement).value).toBe('9');
  });

  it('goes on to the next cell that can be edited with Tab', async () => {
    const { at, press, type, plan, here } = open();
    await at(2, 2);
    await press('Enter');
    await type('15');
    await press('Tab');
    expect(plan().part.layers[2].thickness).toBe(0.015);
    expect(here()).toEqual([2, 4]); // the last layer has no contact to a next one
    await press('F2');
    await press('Tab', { shiftKey: true });
    expect(here()).toEqual([2, 2]);
  });

  it('does not keep nonsense, and does not lose it either', async () => {
    const { table, at, press, type, plan, cell } = open();
    await at(0, 2);
    await press('Enter');
    await type('thick');
    await press('Enter');
    expect(table.find('.cell-editor').exists()).toBe(true);
    await press('Tab');
    expect(plan().part.layers[0].thickness).toBe(0.15);
    expect(cell(0, 2).text()).toBe('thick');
    expect(cell(0, 2).classes()).toContain('bad');
    expect(table.get('.table-said').text()).toContain('“thick” was not taken, the plan still has 150 mm');
    await at(0, 2);
    await press('Enter');
    expect((table.get('.cell-editor input').element as HTMLInputElement).value).toBe('thick');
    await press('Escape');
    expect(cell(0, 2).text()).toContain('150');
  });

  it('of a choice takes what was chosen', async () => {
    const { table, at, press, plan } = open();
    await at(0, 1);
    await press('Enter');
    await table.get('.cell-editor select').setValue('steel');
    expect(plan().part.layers[0].material).toBe('steel');
  });

  it('begins with the second click', async () => {
    const { table, cell } = open();
    const click = async () => {
      await cell(0, 2).trigger('pointerdown');
      (cell(0, 2).element as HTMLElement).focus();
      await cell(0, 2).trigger('click');
    };
    await click();
    expect(table.find('.cell-editor').exists()).toBe(false);
    await click();
    expect(table.find('.cell-editor').exists()).toBe(true);
  });
});

describe('rows', () => {
  it('Insert adds one after this one and goes there', async () => {
    const { at, press, plan, here } = open();
    await at(0, 2);
    await press('Insert');
    expect(plan().part.layers.map(({ name }) => name)).toEqual(['Lining', 'Layer 4', 'Backing', 'Shell']);
    expect(here()).toEqual([1, 0]);
  });

  it('Delete removes one and stays in place', async () => {
    const { at, press, plan, here } = open();
    await at(2, 2);
    await press('Delete');
    expect(plan().part.layers).toHaveLength(2);
    expect(here()).toEqual([1, 2]);
  });

  it('Delete on the only one says why not', async () => {
    const { table, at, press, plan } = open(
      lining((project) => ({
        ...project,
        part: { ...project.part, layers: [project.part.layers[0]] },
        probes: [],
        requirements: [],
      })),
    );
    await at(0, 0);
    await press('Delete');
    expect(plan().part.layers).toHaveLength(1);
    expect(table.text()).toContain('A part keeps at least one layer');
  });

  it('Alt and an arrow move one, and the cursor with it', async () => {
    const { at, press, plan, here } = open();
    await at(0, 2);
    await press('ArrowDown', { altKey: true });
    expect(plan().part.layers.map(({ id }) => id)).toEqual(['l2', 'l1', 'l3']);
    expect(here()).toEqual([1, 2]);
  });
});

describe('blocks of cells', () => {
  function clipboard(type: string, text = ''): ClipboardEvent & { got: Record<string, string> } {
    const got: Record<string, string> = {};
    const event = new Event(type, { bubbles: true, cancelable: true });
    const data = { getData: () => text, setData: (kind: string, value: string) => (got[kind] = value) };
    return Object.assign(event, { clipboardData: data, got }) as never;
  }

  it('are copied with heads and units', async () => {
    const { table } = open();
    const event = clipboard('copy');
    table.get('table').element.dispatchEvent(event);
    expect(event.got['text/plain'].split('\n').slice(0, 3)).toEqual([
      'Part\tMaterial\tThickness\tContact to next\tStart',
      'Lining\tBrick\t150 mm\tbonded\t25 °C',
      'Backing\tBrick\t75 mm\t0.004 m²·K/W\t25 °C',
    ]);
    expect(event.got['text/html']).toContain('<th>Thickness</th>');
  });

  it('are pasted after a preview of what does not fit, as one edit', async () => {
    const { table, at, plan, names } = open();
    await at(0, 0);
    table
      .get('table')
      .element.dispatchEvent(
        clipboard('paste', 'Inner\tSteel\t6 in\nOuter\tGold\t20 mm\nCase\tsteel\tauto\nMore\tBrick\t1 cm\n'),
      );
    await nextTick();
    expect(names).toEqual([]);
    expect(table.text()).toContain('Paste 4 × 3 cells? 10 fit, 2 do not, the first: row 2, material, “Gold”');
    await table
      .findAll('button')
      .find((button) => button.text() === 'Paste 10')
      ?.trigger('click');
    expect(names).toEqual(['Paste 10 cells']);
    expect(plan().part.layers.map(({ name, material, thickness }) => [name, material, thickness])).toEqual([
      ['Inner', 'steel', 0.1524],
      ['Outer', 'brick', 0.02],
      ['Case', 'steel', 0.012],
      ['More', 'brick', 0.01],
    ]);
  });

  it('of one cell go straight in', async () => {
    const { table, at, plan } = open();
    await at(0, 2);
    table.get('table').element.dispatchEvent(clipboard('paste', '100 mm'));
    expect(plan().part.layers[0].thickness).toBe(0.1);
  });
});

describe('the head', () => {
  it('closes the table to its summary', async () => {
    const { table } = open();
    await table.get('button[aria-expanded]').trigger('click');
    expect(table.find('tbody').exists()).toBe(false);
    expect(table.text()).toContain('3 layers');
  });
});

it('a cell whose number the plan cannot have is marked, with the reason below', async () => {
  const broken = { ...lining(), part: { ...lining().part } };
  broken.part.layers = broken.part.layers.map((layer, index) => (index === 1 ? { ...layer, thickness: -1 } : layer));
  const { table, cell } = open(broken);
  expect(cell(1, 2).attributes('aria-invalid')).toBe('true');
  expect(table.get('.table-said').text()).toBe('Thickness of Backing must be more than 0 mm, got −1000 mm');
});
