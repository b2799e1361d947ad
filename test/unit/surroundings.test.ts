import { expect, test } from 'vitest';

// The suite runs twice, the second time far from here. This holds that the second time really is: otherwise that run
// would say nothing.
const isElsewhere = process.env.TZ === 'Pacific/Chatham';

test('tests run in the time zone and the locale that their project names', () => {
  expect(Intl.DateTimeFormat().resolvedOptions().timeZone).toBe(process.env.TZ);
  expect(new Date(2024, 0, 1).getTimezoneOffset()).toBe(isElsewhere ? -(13 * 60 + 45) : 0);
  expect((1234.5).toLocaleString()).toBe(isElsewhere ? '1.234,5' : '1,234.5');
});
