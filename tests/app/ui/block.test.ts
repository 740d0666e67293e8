import { describe, expect, it } from 'vitest';
import { parseBlock, writeBlock } from '../../../app/ui/grid/block';

describe('a block of cells', () => {
  it('is read from what spreadsheets put on the clipboard', () => {
    expect(parseBlock('a\tb\r\nc\td\r\n')).toEqual([
      ['a', 'b'],
      ['c', 'd'],
    ]);
    expect(parseBlock('1\t\t3')).toEqual([['1', '', '3']]);
    expect(parseBlock('"two\nlines"\t"say ""so"""')).toEqual([['two\nlines', 'say "so"']]);
    expect(parseBlock('2"')).toEqual([['2"']]);
  });

  it('comes back as it was written', () => {
    const block = [
      ['plain', 'with\ttab', 'two\nlines'],
      ['say "so"', '', 'x'],
    ];
    expect(parseBlock(writeBlock(block))).toEqual(block);
  });

  it('has minus signs that a spreadsheet takes for numbers', () => expect(writeBlock([['−5']])).toBe('-5'));
});
