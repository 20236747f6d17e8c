/**
 * Migrations: how a file of an earlier version becomes one of this version. The list is append-only.
 * Holds: the entry at place i leads from version i + 1 to version i + 2, so the version that this program writes follows from
 * the list. Version 1 is the first.
 */
import { assert, present } from '../base';

/** One step from a version to the next. */
export interface Migration {
  /** The version it leads to. */
  readonly to: number;
  /** What changed in the format, for people. */
  readonly title: string;
  /** The document of the version before, as plain data, in the form of version `to`. Changes nothing in place. */
  readonly apply: (document: Readonly<Record<string, unknown>>) => Record<string, unknown>;
}

/** Every migration so far: none, since version 1 is the first. */
export const MIGRATIONS: readonly Migration[] = [];

/** The version of the files that this program writes. */
export const WORKSHEET_VERSION = MIGRATIONS.length + 1;

/** The document in the form of the last version. Throws when the list is out of order or `from` is not a version of it. */
export function migrate(
  document: Readonly<Record<string, unknown>>,
  from: number,
  migrations: readonly Migration[] = MIGRATIONS,
): Readonly<Record<string, unknown>> {
  migrations.forEach((migration, i) => {
    assert(migration.to === i + 2, `migration ${String(i)} leads to version ${String(i + 2)}`);
  });
  assert(Number.isInteger(from) && from >= 1 && from <= migrations.length + 1, `${String(from)} is a known version`);
  let migrated = document;
  for (let version = from; version <= migrations.length; version++)
    migrated = { ...present(migrations[version - 1], 'the migration').apply(migrated), version: version + 1 };
  return migrated;
}
