'use client';
import { useState } from 'react';
import type { Inspection, Mapping } from '@/lib/intake/types';
import type { FileChoices } from '@/lib/jobs/import-types';
import { QUANTITIES, UNITS_OF } from '@/lib/series/quantities';
import ui from '../ui.module.css';
import type { Asked, Control } from './asked.ts';
import type { ChoicesEdit } from './choices-edit.ts';
import { Choice, Field } from './field.tsx';
import { isDocument, LAYOUT_WORDS, ORDER_WORDS, QUANTITY_WORDS, TEXT_LAYOUTS, UNIT_WORDS } from './words.ts';

export interface ControlProps {
  inspection: Omit<Inspection, 'problems'>;
  mapping: Mapping;
  choices: FileChoices;
  asked: Asked;
  change(control: Control, edit: ChoicesEdit): void;
}

/** What nearly every file has to be asked or looked at for: layout, station, order of the dates, quantity, unit. */
export function MainControls(props: ControlProps) {
  const { inspection, mapping, choices, asked, change } = props;
  const { layout, date, quantity = 'flow' } = mapping;
  const wholeDates = date.columns.length === 1 && !['month-rows', 'day-rows'].includes(layout);
  return (
    <>
      {inspection.sheets && (
        <Choice
          label="Sheet"
          asked={asked.sheet}
          value={mapping.sheet ?? null}
          options={inspection.sheets.map((sheet) => ({ value: sheet, words: sheet }))}
          onChange={(sheet) => change('sheet', { mapping: { sheet: sheet ?? undefined } })}
        />
      )}
      {isDocument(layout) ? (
        <Field label="Layout">
          {(ids) => <input {...ids} className={ui.input} value={LAYOUT_WORDS[layout]} readOnly />}
        </Field>
      ) : (
        <Choice
          label="Layout"
          asked={asked.layout}
          value={layout}
          options={TEXT_LAYOUTS.map((value) => ({ value, words: LAYOUT_WORDS[value] }))}
          onChange={(value) => change('layout', { mapping: { layout: value ?? undefined } })}
        />
      )}
      <StationControl {...props} />
      {wholeDates && !isDocument(layout) && (
        <Choice
          label="Order of the dates"
          asked={asked.date}
          value={asked.date && choices.mapping?.date === undefined ? null : date.order}
          options={(['dmy', 'mdy', 'ymd'] as const).map((value) => ({ value, words: ORDER_WORDS[value] }))}
          onChange={(order) => change('date', { mapping: { date: order ? { ...date, order } : undefined } })}
        />
      )}
      <Choice
        label="Quantity"
        asked={asked.quantity}
        value={asked.quantity && choices.mapping?.quantity === undefined ? null : quantity}
        options={QUANTITIES.map((value) => ({ value, words: QUANTITY_WORDS[value] }))}
        onChange={(value) => {
          const fits = mapping.unit !== null && UNITS_OF[value ?? 'flow'].includes(mapping.unit);
          change('quantity', { mapping: { quantity: value ?? undefined, ...(fits ? {} : { unit: undefined }) } });
        }}
      />
      <Choice
        label="Unit of the values"
        asked={asked.unit}
        value={mapping.unit}
        options={UNITS_OF[quantity].map((value) => ({ value, words: UNIT_WORDS[value] }))}
        onChange={(unit) => change('unit', { unit: undefined, mapping: { unit: unit ?? undefined } })}
      />
    </>
  );
}

const STATION_WORDS: Record<Mapping['station']['from'], string> = {
  column: 'a column of the file',
  header: 'the headings of the columns',
  'lines-above': 'the lines above the table',
  'file-name': 'the name of the file',
  given: 'the code below',
};

function StationControl({ mapping, choices, asked, change }: ControlProps) {
  const { station } = mapping;
  const [code, setCode] = useState(choices.station ?? (station.from === 'given' ? station.code : ''));
  /** a code is to be given; until one is, the file is read as before */
  const [giving, setGiving] = useState(station.from === 'given');
  const own = true;
  const setFrom = (from: Mapping['station']['from'] | null) => {
    setGiving(from === 'given');
    if (from === 'given') change('station', { own, ...(code ? { station: code } : {}), mapping: givenCode(code) });
    else if (from === 'column') change('station', { station: undefined, mapping: { station: undefined } });
    else if (from) change('station', { station: undefined, mapping: { station: { from } } });
  };
  const possible = (['file-name', 'given', 'lines-above'] as const).map((value) => ({
    value,
    words: STATION_WORDS[value],
  }));
  const byContent = station.from === 'column' || station.from === 'header' ? [station.from] : [];
  if (isDocument(mapping.layout)) return null;
  return (
    <>
      <Choice
        label="Station comes from"
        asked={asked.station}
        hint={station.from === 'column' ? 'Which column, its heading below says.' : undefined}
        value={giving ? 'given' : station.from}
        options={[...byContent.map((value) => ({ value, words: STATION_WORDS[value] })), ...possible]}
        onChange={setFrom}
      />
      {(giving || asked.station) && (
        <Field
          label="Code of the station"
          asked={giving && code.trim() === '' ? 'This has to be told.' : null}
          hint="As in the station list; leading zeros count."
        >
          {(ids) => (
            <input
              {...ids}
              className={ui.input}
              value={code}
              onChange={(event) => {
                const next = event.target.value.trim();
                setCode(event.target.value);
                change('station', { own, station: next || undefined, mapping: givenCode(next) });
              }}
            />
          )}
        </Field>
      )}
    </>
  );
}

const givenCode = (code: string): Partial<Mapping> => ({
  station: code === '' ? undefined : { from: 'given', code },
});
