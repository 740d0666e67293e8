import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { createDocuments, createJournal, createRecentFiles, readText, wordFileError } from '../../../main/files';

let folder: string;
let path: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'soakwright-files-'));
  path = join(folder, 'plan.soak');
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('documents in hand', () => {
  it('are saved again and again without a question', async () => {
    await writeFile(path, 'one');
    const documents = createDocuments();
    expect(await documents.open(path)).toBe('one');
    expect(await documents.save(path, 'two')).toBe('saved');
    expect(await documents.save(path, 'three')).toBe('saved');
    expect(await readFile(path, 'utf8')).toBe('three');
  });

  it('are not written over a change that somebody else made, unless told to', async () => {
    await writeFile(path, 'one');
    const documents = createDocuments();
    await documents.open(path);
    await writeFile(path, 'two'); // same length: only the content tells
    expect(await documents.save(path, 'mine')).toBe('changed-on-disk');
    expect(await readFile(path, 'utf8')).toBe('two');
    expect(await documents.save(path, 'mine', { overwriteChanged: true })).toBe('saved');
    expect(await readFile(path, 'utf8')).toBe('mine');
  });

  it('come back under their name when they were deleted meanwhile', async () => {
    await writeFile(path, 'one');
    const documents = createDocuments();
    await documents.open(path);
    await rm(path);
    expect(await documents.save(path, 'two')).toBe('saved');
  });

  it('are only those that somebody chose', async () => {
    await writeFile(path, 'one');
    const documents = createDocuments();
    await expect(documents.save(path, 'stolen')).rejects.toThrow(RangeError);
    documents.take(path);
    expect(await documents.save(path, 'chosen')).toBe('saved');
  });

  it('refuse a file that is far too large to be a plan', async () => {
    await writeFile(path, Buffer.alloc(64 * 2 ** 20 + 1));
    const error = await readText(path).catch((reason: unknown) => reason);
    expect(wordFileError(error, path, 'open')).toContain('larger than 64 MB');
  });
});

describe('errors of files', () => {
  const wordFor = (code: string, doing: 'open' | 'save') => wordFileError(Object.assign(new Error(code), { code }), path, doing);

  it('name the file, the obstacle and a way out', () => {
    expect(wordFor('EACCES', 'save')).toBe(
      'plan.soak could not be saved: you have no right to write the file or its folder. Choose another place with Save as.',
    );
    expect(wordFor('ENOENT', 'save')).toContain(`the folder ${folder} is not there any more`);
    expect(wordFor('ENOENT', 'open')).toContain('no such file any more');
    expect(wordFor('ENOSPC', 'save')).toContain('the disk is full');
  });

  it('never hide a code that has no words yet', () => {
    expect(wordFor('EMFILE', 'open')).toBe('plan.soak could not be opened (EMFILE).');
  });

  it('come from the file system itself for a place that cannot be written', async () => {
    const documents = createDocuments();
    const nowhere = join(folder, 'gone', 'plan.soak');
    documents.take(nowhere);
    const error = await documents.save(nowhere, 'text').catch((reason: unknown) => reason);
    expect(wordFileError(error, nowhere, 'save')).toContain('is not there any more');
  });
});

describe('recent files', () => {
  it('stand newest first, once each, twelve at most, missing ones marked', async () => {
    let hour = 0;
    const recent = createRecentFiles(join(folder, 'recent.json'), () => new Date(Date.UTC(2026, 0, 1, hour++)));
    await writeFile(path, '');
    await Promise.all(Array.from({ length: 14 }, (_, i) => recent.add(join(folder, `gone-${i}.soak`))));
    await recent.add(path);
    await recent.add(join(folder, 'gone-12.soak'));
    const list = await recent.list();
    expect(list).toHaveLength(12);
    expect(list[0]).toEqual({ path: join(folder, 'gone-12.soak'), opened: '2026-01-01T15:00:00.000Z', missing: true });
    expect(list[1]).toMatchObject({ path, missing: false });
    expect(list.filter((entry) => entry.path.endsWith('gone-12.soak'))).toHaveLength(1);
  });

  it('can be forgotten, and a damaged list counts as empty', async () => {
    const store = join(folder, 'recent.json');
    const recent = createRecentFiles(store);
    await recent.add(path);
    await recent.forget();
    expect(await recent.list()).toEqual([]);
    await writeFile(store, '{"half');
    expect(await recent.list()).toEqual([]);
    await recent.add(path);
    expect(await recent.list()).toHaveLength(1);
  });
});

describe('the journal', () => {
  const record = { title: 'Plan', edited: '2026-01-01T10:00:00.000Z', text: '{"a": "°C\\n"}\n', fileName: null };

  it('gives back the last record that was written', async () => {
    const journal = createJournal(join(folder, 'journal'));
    expect(await journal.read()).toBeNull();
    await Promise.all([journal.write({ ...record, title: 'older' }), journal.write(record)]);
    expect(await journal.read()).toEqual(record);
    await journal.clear();
    expect(await journal.read()).toBeNull();
  });

  it('is not offered when a single character of it is wrong', async () => {
    const store = join(folder, 'journal');
    const journal = createJournal(store);
    await journal.write(record);
    await writeFile(store, (await readFile(store, 'utf8')).replace('Plan', 'Plon'));
    expect(await journal.read()).toBeNull();
  });
});
