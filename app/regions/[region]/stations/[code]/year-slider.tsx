'use client';
import type { KeyboardEvent, PointerEvent, ReactNode } from 'react';

interface Props {
  label: string;
  span: [number, number];
  /** the year being read, and what it says; null while none is */
  year: number | null;
  text: string | null;
  className?: string;
  /** year at the pointer, between whole years too */
  yearAt(pixels: number): number;
  onYear(year: number): void;
  onKeyDown(event: KeyboardEvent): void;
  onLeave(): void;
  /** a click by mouse or pen; a finger's tap only reads */
  onOpen?(): void;
  children: ReactNode;
}

/** A figure over years as one control: the pointer or the arrow keys choose the year that is read out. */
export function YearSlider({
  label,
  span,
  year,
  text,
  className,
  yearAt,
  onYear,
  onKeyDown,
  onLeave,
  onOpen,
  children,
}: Props) {
  const point = (event: PointerEvent<HTMLDivElement>) =>
    onYear(yearAt(event.clientX - event.currentTarget.getBoundingClientRect().left));
  return (
    <div
      role="slider"
      tabIndex={0}
      className={className}
      aria-label={label}
      aria-valuemin={span[0]}
      aria-valuemax={span[1]}
      aria-valuenow={year ?? span[0]}
      aria-valuetext={text ?? 'No year chosen: the arrow keys move through the years'}
      onPointerMove={point}
      onPointerDown={point}
      onPointerUp={(event) => event.pointerType !== 'touch' && onOpen?.()}
      onPointerLeave={onLeave}
      onBlur={onLeave}
      onKeyDown={onKeyDown}
    >
      {children}
    </div>
  );
}
