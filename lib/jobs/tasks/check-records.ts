import { checkRecord } from '../../checks/check-record.ts';
import { type CheckedRecord, replaceFindings } from '../../store/checked-records.ts';
import { readStored } from '../../store/records.ts';

/** How many records were checked, how many of them have findings, and how many these are. */
export interface CheckCounts {
  stations: number;
  withFindings: number;
  findings: number;
}

/** Checks the records of daily flows of some stations and stores what was found.
 *  @param task.today  day number of the day of checking */
export async function checkRecords({
  stationIds,
  today,
}: {
  stationIds: readonly number[];
  today: number;
}): Promise<CheckCounts> {
  const checked: CheckedRecord[] = [];
  readStored(stationIds, (stationId, series, { hash, areaKm2 }) => {
    checked.push({ stationId, hash, areaKm2, ...checkRecord(series, { areaKm2, today }) });
  });
  await replaceFindings(checked);
  return {
    stations: checked.length,
    withFindings: checked.filter(({ findings }) => findings.length > 0).length,
    findings: checked.reduce((sum, { findings }) => sum + findings.length, 0),
  };
}
