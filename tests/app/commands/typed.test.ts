import { describe, expect, it } from 'vitest';
import { applyCommand, parsePlace, removeLayer, setThickness, together, typedAt } from '../../../app/commands';
import { placeOf } from '../../../solver/model';
import { lining } from '../support/lining';

const plan = lining();
const [l1, l2, l3] = plan.part.layers;
const inches = applyCommand(plan, setThickness(l2, { value: 0.0762, text: '76.2 mm', typed: '3 in' }));
const at = (layer: number) => ['part', 'layers', layer, 'thickness'];

describe('what was typed', () => {
  it('is kept beside the number it stands for', () => {
    expect(typedAt(inches, at(1))).toBe('3 in');
    expect(inches.part.layers[1].thickness).toBe(0.0762);
  });

  it('is dropped when the number changes without it', () => {
    expect(applyCommand(inches, setThickness(l2, { value: 0.08, text: '80 mm' })).typed).toBeUndefined();
  });

  it('gives way to what is typed next', () => {
    const next = applyCommand(inches, setThickness(l2, { value: 0.1016, text: '101.6 mm', typed: '4 in' }));
    expect(next.typed).toEqual({ 'part.layers[1].thickness': '4 in' });
  });

  it('does not come to stand for another number when rows move up', () => {
    expect(applyCommand(inches, removeLayer(l1)).typed).toBeUndefined();
  });

  it('survives edits of other numbers', () => {
    const next = applyCommand(
      inches,
      together('two', [setThickness(l1, { value: 0.2, text: '' }), setThickness(l3, { value: 0.01, text: '' })]),
    );
    expect(typedAt(next, at(1))).toBe('3 in');
  });
});

it('a place of the document is read back into its path', () => {
  for (const path of [['title'], ['part', 'layers', 12, 'thickness'], ['cycle', 'stages', 0, 'end', 'after']]) {
    expect(parsePlace(placeOf(path))).toEqual(path);
  }
});
