'use client';
import { type KeyboardEvent, useState } from 'react';

/** Which year of a figure is being read: by pointer (nearest year) or by arrow keys, Home and End. */
export function useYearReader(years: readonly number[]) {
  const [picked, setPicked] = useState<number | null>(null);
  const pickNearest = (year: number) => {
    if (years.length === 0) return;
    setPicked(years.reduce((best, other) => (Math.abs(other - year) < Math.abs(best - year) ? other : best)));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const move = { ArrowLeft: -1, ArrowRight: 1, Home: -years.length, End: years.length }[event.key];
    if (move === undefined || years.length === 0) return;
    event.preventDefault();
    const at = picked === null ? -1 : years.indexOf(picked);
    const from = at < 0 ? (move > 0 ? -1 : years.length) : at;
    setPicked(years[Math.min(years.length - 1, Math.max(0, from + move))]);
  };
  return { picked, pickNearest, onKeyDown, clear: () => setPicked(null) };
}
