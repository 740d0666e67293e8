/**
 * Migrations: frozen history, plain data in and out, importing nothing of today's.
 *
 * Migration n takes a document of version n to version n + 1. The list has no gaps and checks itself on start.
 */
export type PlainDocument = Record<string, unknown>;

export interface Migration {
  /** The version it starts from. */
  from: number;
  /** What changed, in words. */
  change: string;
  up(document: PlainDocument): PlainDocument;
}

export const migrations: readonly Migration[] = [
  {
    from: 1,
    change: 'Round parts, curves over temperature, sources and radiation came; nothing said before changed its meaning.',
    up: (document) => document,
  },
];

export type MigrationOutcome =
  | { kind: 'current'; document: PlainDocument }
  | { kind: 'migrated'; document: PlainDocument; from: number }
  | { kind: 'newer'; version: number };

/** Throws when the list has a gap, or does not end at `current`: a fault of ours, not of a file. */
export function checkMigrations(list: readonly Migration[], current: number): void {
  list.forEach((migration, index) => {
    if (migration.from !== index + 1)
      throw new Error(`migration ${index} starts from version ${migration.from}, expected ${index + 1}`);
  });
  if (list.length !== current - 1) throw new Error(`${list.length} migrations do not lead to version ${current}`);
}

/** Brings a document of `version` up to `current`; the document given is not changed. */
export function migrate(
  document: PlainDocument,
  version: number,
  current: number,
  list: readonly Migration[] = migrations,
): MigrationOutcome {
  if (version > current) return { kind: 'newer', version };
  if (version === current) return { kind: 'current', document };
  let now = structuredClone(document);
  for (const step of list.slice(version - 1)) now = { ...step.up(now), version: step.from + 1 };
  return { kind: 'migrated', document: now, from: version };
}
