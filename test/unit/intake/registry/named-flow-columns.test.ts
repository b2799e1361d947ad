import { expect, test } from 'vitest';
import { monthsIn, namedFlowColumns, namedFlowsOf } from '../../../../lib/intake/registry/named-flow-columns.ts';

const flowsIn = (headings: string[], fields: string[]) =>
  namedFlowsOf((at) => fields[at] ?? '', namedFlowColumns(headings), 'thousands');

test('namedFlowColumns finds flows by their headings, with unit and months', () => {
  const found = namedFlowColumns([
    'id',
    'legal_minimum_m3s',
    'abstraction_stop_l_s',
    'Residual flow Apr-Sep (ML/d)',
    'intakeLevel',
  ]);
  expect(found.map(({ kind, name, value, unit, months }) => [kind, name, value, unit, months])).toEqual([
    ['legal minimum', 'legal minimum', 1, 'm3/s', null],
    ['abstraction stop', 'abstraction stop', 2, 'L/s', null],
    ['residual flow', 'residual flow', 3, 'ML/d', [4, 5, 6, 7, 8, 9]],
    ['intake level', 'intake level', 4, null, null],
  ]);
  expect(namedFlowColumns(['id', 'name', 'flow_m3s', 'minimum', 'river level'])).toEqual([]);
});

test('namedFlowsOf reads units and months row by row, and leaves empty ones out', () => {
  const headings = ['id', 'residual_flow', 'residual_flow_unit', 'residual_flow_months', 'legal_minimum_m3s'];
  expect(flowsIn(headings, ['A', '250', 'L/s', 'Oct–Mar', ''])).toEqual([
    { name: 'residual flow', kind: 'residual flow', value: 250, unit: 'L/s', months: [1, 2, 3, 10, 11, 12] },
  ]);
  expect(flowsIn(headings, ['A', '', '', '', '1,250.5'])).toEqual([
    { name: 'legal minimum', kind: 'legal minimum', value: 1250.5, unit: 'm3/s', months: null },
  ]);
});

test.each([
  [['250', '', ''], /in which unit/],
  [['-1', 'L/s', ''], /is not a flow/],
  [['much', 'L/s', ''], /is not a flow/],
  [['1', 'L/s', 'summer'], /months/],
])('namedFlowsOf refuses %j', (fields, reason) => {
  const answer = flowsIn(['residual_flow', 'residual_flow_unit', 'residual_flow_months'], fields);
  expect(answer).toMatchObject({ reason: expect.stringMatching(reason) });
});

test.each([
  ['4-9', [4, 5, 6, 7, 8, 9]],
  ['11-2', [1, 2, 11, 12]],
  ['Apr to Jun, 9', [4, 5, 6, 9]],
  ['7', [7]],
  ['13', null],
  ['0-3', null],
  ['1-2-3', null],
])('monthsIn(“%s”) is %j', (text, months) => {
  expect(monthsIn(text)).toEqual(months);
});
