/** What a form of the basis editor holds, as the schema wants it: what cannot be read goes on as it is, for the schema to
 *  refuse in words. */

export const text = (form: FormData, name: string): string => String(form.get(name) ?? '').trim();

/** A number as typed, a decimal comma allowed; what is none stays text, so that the message can show it. */
export const number = (form: FormData, name: string): unknown => {
  const typed = text(form, name).replace(',', '.');
  return typed !== '' && Number.isFinite(Number(typed)) ? Number(typed) : typed;
};

/** Percent as typed → share, free of binary tails: "12.5" → 0.125 */
export const share = (form: FormData, name: string): unknown => {
  const percent = number(form, name);
  return typeof percent === 'number' ? Number((percent / 100).toFixed(6)) : percent;
};
