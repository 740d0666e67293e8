import { describe, expect, it } from 'vitest';
import { VERSION, checkProject, newProject, readProject, writeProject } from '../../solver/model';
import { checkMigrations, migrate, migrations, type Migration, type PlainDocument } from '../../solver/model/migrations';
import { pairs, unproven, type Pair } from './pairs';

/** Made-up history: version 1 had minutes, version 2 got seconds, version 3 a list of notes. */
const made: readonly Migration[] = [
  {
    from: 1,
    change: 'hold in seconds instead of minutes',
    up: ({ minutes, ...rest }) => ({ ...rest, seconds: 60 * (minutes as number) }),
  },
  {
    from: 2,
    change: 'notes are a list',
    up(document) {
      document['notes'] = [document['notes']];
      return document;
    },
  },
];
const first = (): PlainDocument => ({ version: 1, minutes: 5, notes: 'slow', kept: { deep: [1, 2] } });
const third: PlainDocument = { version: 3, seconds: 300, notes: ['slow'], kept: { deep: [1, 2] } };

describe('the runner of migrations', () => {
  it('takes a document through every version in order', () => {
    expect(migrate(first(), 1, 3, made)).toEqual({ kind: 'migrated', from: 1, document: third });
  });

  it('joins the history where the document stands', () => {
    const second = { version: 2, seconds: 10, notes: 'x' };
    expect(migrate(second, 2, 3, made)).toMatchObject({ from: 2, document: { version: 3, seconds: 10, notes: ['x'] } });
  });

  it('would go wrong in another order: the order is kept', () => {
    const order: number[] = [];
    const watched = made.map((step) => ({
      ...step,
      up: (document: PlainDocument) => (order.push(step.from), step.up(document)),
    }));
    migrate(first(), 1, 3, watched);
    expect(order).toEqual([1, 2]);
  });

  it('leaves the document that it was given as it is, even where a migration changes its own', () => {
    const given = first();
    migrate(given, 1, 3, made);
    expect(given).toEqual(first());
    const second: PlainDocument = { version: 2, notes: 'x' };
    migrate(second, 2, 3, made);
    expect(second).toEqual({ version: 2, notes: 'x' });
  });

  it('gives a current document back as it is', () => {
    expect(migrate(third, 3, 3, made)).toEqual({ kind: 'current', document: third });
  });

  it('refuses a newer document, naming its version', () => {
    expect(migrate({ version: 4 }, 4, 3, made)).toEqual({ kind: 'newer', version: 4 });
  });

  it.each([
    ['a gap', [made[1]], 2],
    ['a gap in the middle', [made[0], { ...made[1], from: 3 }], 3],
    ['two of one version', [made[0], { ...made[0] }], 3],
    ['another order', [made[1], made[0]], 3],
    ['too few for the current version', made, 4],
    ['too many for the current version', made, 2],
  ])('does not start with %s', (_, list, current) => {
    expect(() => checkMigrations(list, current)).toThrow(/migration/);
  });

  it('starts with a whole history, and with none', () => {
    expect(() => checkMigrations(made, 3)).not.toThrow();
    expect(() => checkMigrations([], 1)).not.toThrow();
  });
});

describe('before/after pairs', () => {
  const proven: Record<number, Pair> = {
    1: { before: first(), after: { version: 2, seconds: 300, notes: 'slow', kept: { deep: [1, 2] } } },
    2: { before: { version: 2, seconds: 300, notes: 'slow' }, after: { version: 3, seconds: 300, notes: ['slow'] } },
  };

  it('of the made-up history are all proven', () => {
    expect(unproven(made, proven)).toEqual([]);
  });

  it('are missed where one is missing, or says something else', () => {
    expect(unproven(made, { 2: proven[2] })).toEqual([1]);
    expect(unproven(made, { 1: proven[1], 2: { ...proven[2], after: { ...proven[2].after, seconds: 301 } } })).toEqual([2]);
    expect(unproven(made, {})).toEqual([1, 2]);
  });

  it("exist for each of the program's own migrations, and for no other", () => {
    expect(unproven(migrations, pairs)).toEqual([]);
    expect(Object.keys(pairs).map(Number)).toEqual(migrations.map(({ from }) => from));
  });
});

describe("the program's own history", () => {
  it('leads to the version it writes', () => {
    expect(migrations).toHaveLength(VERSION - 1);
    expect(() => checkMigrations(migrations, VERSION)).not.toThrow();
    expect(newProject().version).toBe(VERSION);
  });

  it('opens a file of the current version without migrating it', () => {
    expect(readProject(writeProject(newProject()))).toMatchObject({ kind: 'project', migratedFrom: null });
  });

  it('answers a newer file with both versions, and leaves it untouched', () => {
    const newer = Object.freeze({ ...newProject(), version: VERSION + 1, shape: 'that is not known here' });
    const read = checkProject(newer);
    expect(read).toMatchObject({ kind: 'newer', version: VERSION + 1 });
    expect(read).toHaveProperty('message', expect.stringContaining(`format ${VERSION + 1}`));
    expect(read).toHaveProperty('message', expect.stringContaining(`up to format ${VERSION}.`));
  });

  it.each([[0], [-1], [1.5], ['1'], [null], [undefined]])('refuses %s as a version', (version) => {
    expect(checkProject({ ...newProject(), version })).toMatchObject({ kind: 'problems', problems: [{ path: ['version'] }] });
  });
});
