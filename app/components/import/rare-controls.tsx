'use client';
import { useState } from 'react';
import type { Mapping } from '@/lib/intake/types';
import ui from '../ui.module.css';
import { Choice, Field } from './field.tsx';
import type { ControlProps } from './main-controls.tsx';
import { isDocument } from './words.ts';

const DECIMALS = [
  { value: '.', words: 'a point: 1.5' },
  { value: ',', words: 'a comma: 1,5' },
] as const;

const THOUSANDS = [
  { value: ',', words: 'a comma: 12,345' },
  { value: '.', words: 'a point: 12.345' },
  { value: ' ', words: 'a blank: 12 345' },
  { value: "'", words: 'an apostrophe: 12’345' },
] as const;

const DELIMITERS = [
  { value: ',', words: 'comma' },
  { value: ';', words: 'semicolon' },
  { value: '\t', words: 'tab' },
] as const;

const SHARES = [0, 0.5, 0.75, 0.8, 0.9, 1];

/** What is recognised for most files: signs of numbers, delimiter, missing values, centuries, several values a day. */
export function RareControls({ mapping, inspection, asked, change }: ControlProps) {
  const { layout, decimal, thousands, delimiter, dailyMean } = mapping;
  const text = !isDocument(layout);
  const delimited = text && delimiter !== undefined;
  return (
    <>
      {text && (
        <Choice
          label="Decimal sign"
          asked={asked.decimal}
          value={decimal}
          options={DECIMALS}
          onChange={(value) => change('decimal', { mapping: { decimal: value ?? undefined, thousands } })}
        />
      )}
      {text && (
        <Choice
          label="Sign between thousands"
          asked={asked.thousands}
          none="none"
          value={thousands ?? null}
          options={THOUSANDS}
          onChange={(value) => change('thousands', { mapping: { thousands: value ?? undefined, decimal } })}
        />
      )}
      {delimited && (
        <Choice
          label="Columns are parted by"
          asked={asked.delimiter}
          value={DELIMITERS.find(({ value }) => value === delimiter)?.value ?? null}
          options={DELIMITERS}
          onChange={(value) => change('delimiter', { mapping: { delimiter: value ?? undefined } })}
        />
      )}
      <MissingTexts
        missing={mapping.missing}
        asked={asked.missing}
        onChange={(missing) => change('missing', { mapping: { missing } })}
      />
      {text && (
        <Century
          firstYear={mapping.firstYear}
          asked={asked.firstYear}
          onChange={(firstYear) => change('firstYear', { mapping: { firstYear } })}
        />
      )}
      <Choice
        label="Several values a day"
        asked={asked.dailyMean}
        none="are not taken"
        value={dailyMean === undefined ? null : String(dailyMean)}
        options={[...new Set([...SHARES, ...(dailyMean === undefined ? [] : [dailyMean])])].map((share) => ({
          value: String(share),
          words:
            share === 0
              ? 'their mean, however much of the day they cover'
              : `their mean, where they cover ${Math.round(share * 100)} % of the day`,
        }))}
        onChange={(value) =>
          change('dailyMean', { mapping: { dailyMean: value === null ? undefined : Number(value) } })
        }
      />
      {delimited && (
        <OnlyRows
          where={mapping.where}
          header={inspection.header}
          asked={asked.where}
          onChange={(where) => change('where', { mapping: { where } })}
        />
      )}
    </>
  );
}

interface MissingProps {
  missing: readonly string[];
  asked: string | undefined;
  onChange(missing: string[] | undefined): void;
}

function MissingTexts({ missing, asked, onChange }: MissingProps) {
  const [text, setText] = useState(missing.join(' '));
  return (
    <Field label="Also means missing" hint="Texts with blanks between, such as -999 M" asked={asked}>
      {(ids) => (
        <input
          {...ids}
          className={ui.input}
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            const texts = event.target.value.split(/\s+/).filter(Boolean);
            onChange(texts.length > 0 ? texts : undefined);
          }}
        />
      )}
    </Field>
  );
}

interface CenturyProps {
  firstYear: number | undefined;
  asked: string | undefined;
  onChange(firstYear: number | undefined): void;
}

function Century({ firstYear, asked, onChange }: CenturyProps) {
  const [text, setText] = useState(firstYear === undefined ? '' : String(firstYear));
  const year = Number(text);
  const known = text !== '' && Number.isInteger(year) && year >= 1000;
  return (
    <Field
      label="Two-digit years begin in"
      hint={
        known ? `They stand for ${year} to ${year + 99}.` : 'For years such as 97: the first year that they can be.'
      }
      asked={asked}
    >
      {(ids) => (
        <input
          {...ids}
          className={ui.input}
          inputMode="numeric"
          placeholder="1930"
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            const next = Number(event.target.value);
            if (event.target.value.trim() === '') onChange(undefined);
            else if (Number.isInteger(next) && next >= 1000) onChange(next);
          }}
        />
      )}
    </Field>
  );
}

interface OnlyRowsProps {
  where: Mapping['where'];
  header: readonly string[] | null;
  asked: string | undefined;
  onChange(where: Mapping['where']): void;
}

/** Of a file that mixes several quantities, the rows that are meant. */
function OnlyRows({ where, header, asked, onChange }: OnlyRowsProps) {
  const at = typeof where?.column === 'string' ? (header?.indexOf(where.column) ?? -1) : (where?.column ?? -1);
  const [column, setColumn] = useState(at);
  const [equals, setEquals] = useState(where?.equals ?? '');
  const choose = (nextColumn: number, nextEquals: string) => {
    setColumn(nextColumn);
    setEquals(nextEquals);
    if (nextColumn < 0) onChange(undefined);
    else if (nextEquals !== '') onChange({ column: nextColumn, equals: nextEquals });
  };
  const options = (header ?? []).map((name, place) => ({ value: String(place), words: name || `column ${place + 1}` }));
  return (
    <>
      <Choice
        label="Only the rows whose"
        asked={asked}
        none="(all rows)"
        value={column < 0 ? null : String(column)}
        options={options}
        onChange={(value) => choose(value === null ? -1 : Number(value), equals)}
      />
      {column >= 0 && (
        <Field label="is" asked={equals === '' ? 'This has to be told.' : null}>
          {(ids) => (
            <input
              {...ids}
              className={ui.input}
              value={equals}
              onChange={(event) => choose(column, event.target.value)}
            />
          )}
        </Field>
      )}
    </>
  );
}
