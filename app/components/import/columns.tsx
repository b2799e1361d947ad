'use client';
import { useState } from 'react';
import type { ChoicesEdit } from './choices-edit.ts';
import { ColumnChoice } from './column-choice.tsx';
import { placesOf, type Role, rolesFor, rolesOf, roleWords, withRole } from './column-roles.ts';
import { firstRows } from './first-rows.ts';
import { FirstRowsTable } from './first-rows-table.tsx';
import type { ControlProps } from './main-controls.tsx';
import { SliceControls } from './slice-controls.tsx';
import type { FileSight } from './use-looks.ts';
import { isDocument } from './words.ts';

interface Props extends ControlProps {
  sight: FileSight;
  /** as `change`, where the numbers of the slices have to follow */
  renewed(edit: ChoicesEdit): void;
}

/** Where things stand in the file, and the first rows as understood. */
export function Columns({ sight, inspection, mapping, asked, change, renewed }: Props) {
  /** roles that no mapping can be made of yet */
  const [draft, setDraft] = useState<{ roles: Role[]; missing: string } | null>(null);
  const fixed = mapping.layout === 'fixed-width';
  const names = fixed || isDocument(mapping.layout) ? null : columnNames(inspection.header, inspection.preview);
  const roles = draft?.roles ?? rolesOf(mapping, inspection.header, names?.length ?? 0);
  const setRole = (column: number, role: Role) => {
    const next = withRole(roles, column, role);
    const { places, missing } = placesOf(next, mapping);
    setDraft(places ? null : { roles: next, missing: missing ?? '' });
    if (places) change('columns', { mapping: places });
  };
  return (
    <>
      {fixed && inspection.valueCandidates.length > 1 && (
        <ColumnChoice
          candidates={inspection.valueCandidates}
          chosen={mapping.value ?? undefined}
          onChoose={(value) => renewed({ mapping: { layout: 'fixed-width', value } })}
        />
      )}
      {fixed && (
        <SliceControls
          mapping={mapping}
          lines={sight.lines}
          asked={asked.columns ?? null}
          onPlaces={(mapping) => change('columns', { mapping })}
        />
      )}
      <FirstRowsTable
        file={sight.file}
        rows={firstRows(inspection)}
        unit={mapping.unit}
        columns={names}
        roles={roles}
        offered={
          names ? rolesFor(mapping.layout).map((role) => ({ role, words: roleWords(role, mapping.layout) })) : []
        }
        asked={draft?.missing ?? (fixed ? null : (asked.columns ?? null))}
        onRole={setRole}
      />
    </>
  );
}

function columnNames(header: readonly string[] | null, preview: readonly string[][]): string[] {
  const count = Math.max(header?.length ?? 0, ...preview.map((row) => row.length));
  return Array.from({ length: count }, (_, at) => header?.[at] ?? '');
}
