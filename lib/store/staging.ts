import { existsSync, rmSync } from 'node:fs';
import Database from 'libsql';
import type { FoundFacts, StagedPart } from '../intake/types.ts';
import { flagsOfCodes } from '../series/day-codes.ts';
import type { ArchivedRegion } from './archived-region.ts';
import { blobOf, blobOfValues } from './blobs.ts';
import { databasePath } from './database-url.ts';
import type { OverlapRule } from './lay-parts.ts';
import type { LayerKind } from './layer-kinds.ts';
import { summarise } from './record-summary.ts';
import { FACT_NAMES, type FactName, type StationInput } from './station-facts.ts';

/** A file that is being taken in. */
export interface StagedFile {
  kind: 'flows' | 'registry' | 'layer';
  fileName: string;
}

/** What is known of a file once it has been read whole. */
export interface StagedFileFacts {
  sha256: string;
  layout?: string;
  unit?: string;
  mapping?: unknown;
  rows?: number;
  accepted?: number;
  rejected?: number;
  /** ImportReport, or for other kinds whatever should be shown again */
  report?: unknown;
  /** of a file that was imported elsewhere before: by whom, when, and its own rule for unlike values */
  by?: string;
  createdAt?: string;
  rule?: OverlapRule;
}

/** Where the files of one import wait, in a database beside the main one, until all of them have been found good.
 *  Everything is synchronous: a worker fills it while it parses, and nobody else looks at it. */
export interface Staging {
  readonly jobId: string;
  readonly path: string;
  /** @returns the file's number, for the calls below */
  addFile(file: StagedFile): number;
  /** One part a file, station and quantity. */
  stagePart(file: number, part: StagedPart, quantity?: string): void;
  /** @param given  the facts that the file speaks of; the others stay as they are */
  stageRegistry(file: number, stations: readonly StationInput[], given?: readonly FactName[]): void;
  /** Stations' facts that a file of flows states beside its days: they only fill in what is empty. */
  stageFacts(file: number, facts: readonly FoundFacts[]): void;
  stageLayer(file: number, layer: { name: string; kind: LayerKind; geojson: string }): void;
  describeFile(file: number, facts: StagedFileFacts): void;
  /** what an archive says of the region itself */
  stageRegion(facts: ArchivedRegion): void;
  /** Ends the filling; applyStaging comes next. */
  seal(): void;
  /** Ends the filling and removes all of it. */
  discard(): void;
}

const TABLES = `
  CREATE TABLE staging.file (id INTEGER PRIMARY KEY, kind TEXT NOT NULL, fileName TEXT NOT NULL, sha256 TEXT NOT NULL DEFAULT '',
    layout TEXT NOT NULL DEFAULT '', unit TEXT NOT NULL DEFAULT '', mapping TEXT NOT NULL DEFAULT '{}',
    rows INTEGER NOT NULL DEFAULT 0, accepted INTEGER NOT NULL DEFAULT 0, rejected INTEGER NOT NULL DEFAULT 0,
    report TEXT NOT NULL DEFAULT '{}', "by" TEXT, createdAt TEXT, rule TEXT);
  CREATE TABLE staging.region (facts TEXT NOT NULL);
  CREATE TABLE staging.registry (file INTEGER NOT NULL, stations TEXT NOT NULL, given TEXT NOT NULL);
  CREATE TABLE staging.facts (file INTEGER NOT NULL, stations TEXT NOT NULL);
  CREATE TABLE staging.layer (file INTEGER NOT NULL, name TEXT NOT NULL, kind TEXT NOT NULL, geojson TEXT NOT NULL);
  CREATE TABLE staging.part (id INTEGER PRIMARY KEY, file INTEGER NOT NULL, code TEXT NOT NULL, quantity TEXT NOT NULL,
    firstDay INTEGER NOT NULL, days INTEGER NOT NULL, unit TEXT NOT NULL, hash TEXT NOT NULL, valueCount INTEGER NOT NULL,
    firstValueDay INTEGER, lastValueDay INTEGER, zeroCount INTEGER NOT NULL, codeList TEXT NOT NULL, "values" BLOB NOT NULL,
    codes BLOB NOT NULL, UNIQUE (file, code, quantity));`;

/** Path of a job's staging database, beside the main one.
 *  @throws RangeError for a job id that is no plain word */
export function stagingPath(jobId: string, path = databasePath()): string {
  if (!/^[A-Za-z0-9_-]{1,100}$/.test(jobId))
    throw new RangeError(`stagingPath: jobId must be a plain word, got "${jobId}"`);
  return `${path}.staging-${jobId}`;
}

/** Opens a new staging database for a job, over any that an earlier try left. */
export function createStaging(jobId: string, path = databasePath()): Staging {
  const file = stagingPath(jobId, path);
  discardStaging(jobId, path);
  const connection = newDatabase(file);
  const insertFile = connection.prepare('INSERT INTO file (kind, fileName) VALUES (?, ?)');
  const insertPart = connection.prepare(
    `INSERT INTO part (file, code, quantity, firstDay, days, unit, hash, valueCount, firstValueDay, lastValueDay,
       zeroCount, codeList, "values", codes) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  // Also what is to be discarded is committed: without a journal SQLite cannot roll back what it has already written, and
  // the broken file could not even be detached.
  const end = () => {
    if (!connection.open) return;
    connection.exec('COMMIT');
    connection.exec('DETACH DATABASE staging');
    connection.close();
  };
  return {
    jobId,
    path: file,
    addFile: ({ kind, fileName }) => Number(insertFile.run([kind, fileName]).lastInsertRowid),
    stagePart(fileId, part, quantity = part.quantity ?? 'flow') {
      const { code, unit, firstDay, values, codes, codeList } = part;
      if (values.length !== codes.length || values.length === 0) {
        throw new RangeError(
          `stagePart: values and codes must be equally long, got ${values.length} and ${codes.length}`,
        );
      }
      const { hash, ...summary } = summarise({ unit, firstDay, values, flags: flagsOfCodes(codes, codeList) });
      insertPart.run([
        ...[fileId, code, quantity, firstDay, values.length, unit, hash, summary.valueCount, summary.firstValueDay],
        ...[summary.lastValueDay, summary.zeroCount, JSON.stringify(codeList), blobOfValues(values), blobOf(codes)],
      ]);
    },
    stageRegistry(fileId, stations, given = FACT_NAMES) {
      connection
        .prepare('INSERT INTO registry (file, stations, given) VALUES (?, ?, ?)')
        .run([fileId, JSON.stringify(stations), JSON.stringify(given)]);
    },
    stageFacts(fileId, facts) {
      if (facts.length === 0) return;
      connection.prepare('INSERT INTO facts (file, stations) VALUES (?, ?)').run([fileId, JSON.stringify(facts)]);
    },
    stageLayer(fileId, { name, kind, geojson }) {
      connection
        .prepare('INSERT INTO layer (file, name, kind, geojson) VALUES (?, ?, ?, ?)')
        .run([fileId, name, kind, geojson]);
    },
    describeFile(fileId, facts) {
      const { sha256, layout = '', unit = '', mapping = {}, rows = 0, accepted = 0, rejected = 0, report = {} } = facts;
      const { by = null, createdAt = null, rule = null } = facts;
      connection
        .prepare(
          `UPDATE file SET sha256 = ?, layout = ?, unit = ?, mapping = ?, rows = ?, accepted = ?, rejected = ?, report = ?,
             "by" = ?, createdAt = ?, rule = ? WHERE id = ?`,
        )
        .run([
          ...[sha256, layout, unit, JSON.stringify(mapping), rows, accepted, rejected, JSON.stringify(report)],
          ...[by, createdAt, rule, fileId],
        ]);
    },
    stageRegion(facts) {
      connection.prepare('INSERT INTO region (facts) VALUES (?)').run([JSON.stringify(facts)]);
    },
    seal: end,
    discard() {
      end();
      discardStaging(jobId, path);
    },
  };
}

/** An empty staging database, attached as `staging` and locked, in a transaction that lasts until it is sealed. */
function newDatabase(file: string): Database.Database {
  // A connection's own file stays open, and locked, until its last statement is collected; an attached one closes when
  // it is detached.
  const connection = new Database(':memory:');
  connection.prepare('ATTACH DATABASE ? AS staging').run([file]);
  // It is thrown away whole when anything fails: no journal. The lock, held to the end, tells that its maker lives.
  for (const pragma of ['locking_mode=EXCLUSIVE', 'journal_mode=OFF', 'synchronous=OFF']) {
    connection.exec(`PRAGMA staging.${pragma}`);
  }
  connection.exec('BEGIN EXCLUSIVE');
  connection.exec(TABLES);
  return connection;
}

/** Removes a job's staging database, if there is one. What was staged is gone; the main database knows nothing of it. */
export function discardStaging(jobId: string, path = databasePath()): void {
  const file = stagingPath(jobId, path);
  for (const name of [file, `${file}-journal`, `${file}-wal`, `${file}-shm`]) {
    if (existsSync(name)) rmSync(name, { force: true });
  }
}
