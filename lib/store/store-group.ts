import type { Group } from './apply-plan.ts';
import { refuseForArea } from './area-error.ts';
import type { Claim } from './claim-import.ts';
import { type Connection, change } from './connection.ts';
import { RevisionCounter } from './count-revisions.ts';
import { type LaidCounts, type LayablePart, layParts } from './lay-parts.ts';
import { loadParts, type RecordHead, standingRecord, storeLaid } from './lay-record.ts';
import { OverlapError } from './overlap-error.ts';
import { registryFile, stagedFileName, stagedHead, stagedPart } from './staged.ts';

/** Stores the records of an import one by one, for nobody to see yet, and counts what each file does to days that stand. */
export class GroupWork {
  /** what the records will be */
  readonly heads: RecordHead[] = [];
  private readonly counters: Map<number, RevisionCounter>;
  private readonly firstImport: number;
  /** a file without a rule has values unlike those that stand */
  private isRefused = false;

  constructor(
    private readonly connection: Connection,
    private readonly claim: Claim,
    /** only counts, and writes nothing */
    private readonly dryRun: boolean,
  ) {
    [this.firstImport] = claim.imports.values();
    this.counters = new Map([...claim.rules.keys()].map((file) => [file, new RevisionCounter()]));
  }

  counterOf(file: number): RevisionCounter {
    return this.counters.get(file)!;
  }

  /** Copies the parts of one record, and lays them over those that stand where there are any. */
  store(group: Group): void {
    const { station, quantity, staged, standing } = group;
    const place = { stationId: station.id, quantity };
    if (standing === 0 && staged.length === 1) {
      const [{ id, file }] = staged;
      const head = stagedHead(this.connection, id);
      this.counterOf(file).extend(head.valueCount);
      if (this.isIdle()) return;
      this.heads.push({ ...head, ...place, partId: this.copyPart(id, file, station.id) });
      return;
    }
    const parts: LayablePart[] = standing > 0 ? loadParts(this.connection, station.id, quantity) : [];
    const stood = parts.length;
    for (const { id, file } of staged) {
      parts.push(stagedPart(this.connection, id, this.claim.rules.get(file) ?? 'keep'));
    }
    const areaKm2 = station.facts.areaKm2 as number | null;
    refuseForArea(parts, { code: station.code, areaKm2 }, () =>
      stagedFileName(this.connection, staged[0]?.file ?? registryFile(this.connection)),
    );
    const { code } = station;
    const { unit } = parts[0];
    const laid = layParts(parts, {
      ...{ quantity, areaKm2 },
      watcher: {
        unlike: (part, day) => {
          if (part >= stood) this.counterOf(staged[part - stood].file).addUnlike({ code, quantity, unit }, day);
        },
        laid: (part, counts) => {
          if (part >= stood) this.count(staged[part - stood].file, counts);
        },
      },
    });
    if (this.isIdle()) return;
    const record = standingRecord(this.connection, station.id, quantity);
    for (const { id, file } of staged) this.copyPart(id, file, station.id);
    this.heads.push(storeLaid(this.connection, place, laid, { standing: record, importId: this.firstImport }));
  }

  /** @throws OverlapError when a file without a rule has values unlike those that stand */
  refuseUnlike(): void {
    if (!this.isRefused) return;
    const files = [...this.counters].filter(([file, { unlike }]) => unlike > 0 && this.claim.rules.get(file) === null);
    const [first, ...others] = files.map(
      ([file, counter]) => [stagedFileName(this.connection, file), counter.firstUnlike, counter.revisions()] as const,
    );
    throw new OverlapError(
      ...first,
      others.map((one) => new OverlapError(...one)),
    );
  }

  private count(file: number, counts: LaidCounts): void {
    this.counterOf(file).add(counts);
    if (counts.unlike > 0 && this.claim.rules.get(file) === null) this.isRefused = true;
  }

  /** Nothing is copied of an import that is refused or only tried; it is read on to count all of it. */
  private isIdle(): boolean {
    return this.dryRun || this.isRefused;
  }

  private copyPart(id: number, file: number, stationId: number): number {
    const copy = change(
      this.connection,
      `INSERT INTO main.Part (importId, stationId, quantity, firstDay, days, unit, codeList, "values", codes)
       SELECT ?, ?, quantity, firstDay, days, unit, codeList, "values", codes FROM staging.part WHERE id = ?`,
    );
    return Number(copy.run([this.claim.imports.get(file)!, stationId, id]).lastInsertRowid);
  }
}
