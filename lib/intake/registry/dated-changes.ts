import { parseIsoDate } from '../../calendar/day.ts';
import { CHANGE_KINDS, type StationChange } from '../../series/station-history.ts';

/** Reads dated changes as a person writes them: "2001-05-01 dam: Upper Kell; 1999-01-01 gauge moved". What is none of the
 *  kinds is of kind other, its text the note.
 *  @returns the first piece that has no date at its start, as text, where there is one */
export function parseChanges(text: string): StationChange[] | string {
  const changes: StationChange[] = [];
  for (const piece of text.split(';').map((part) => part.trim())) {
    if (piece === '') continue;
    const found = /^(\d{4}-\d{2}-\d{2})(?![\d-])[\s:,]*(.*)$/s.exec(piece);
    if (found === null || Number.isNaN(parseIsoDate(found[1]))) return piece;
    changes.push({ date: found[1], ...kindAndNote(found[2]) });
  }
  return changes;
}

function kindAndNote(text: string): { kind: StationChange['kind']; note: string } {
  const plain = text.toLowerCase();
  const kind = CHANGE_KINDS.find((name) => plain === name || new RegExp(`^${name}\\s*[:,(–-]`).test(plain));
  if (kind === undefined) return { kind: 'other', note: text };
  const note = text.slice(kind.length).replace(/^\s*[:,–-]\s*/, '');
  return { kind, note };
}
