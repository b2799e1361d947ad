'use client';
import type { ReactNode } from 'react';
import styles from './evidence.module.css';
import { SECTIONS, type SectionId } from './evidence-state.ts';

export interface Answered {
  /** the plain sentences, the most telling first; none while they are not there */
  sentences: readonly string[];
  /** what stands in its place: that it is under way, was cancelled, or cannot be told */
  instead: ReactNode;
}

/** The answers in plain words, one to a question, each with the way to its figures below. */
export function TheAnswer({ of, answers }: { of: string; answers: Record<SectionId, Answered> }) {
  return (
    <section className={styles.answers} aria-labelledby="answers-title" data-section="answers">
      <h2 id="answers-title" className="visually-hidden">
        In plain words: {of}
      </h2>
      <dl>
        {SECTIONS.map(({ id, label }) => (
          <div key={id} data-answer={id}>
            <dt>
              <a href={`#${id}`}>{label}</a>
            </dt>
            <dd aria-live="polite">
              {answers[id].sentences.length === 0 ? (
                <div className={styles.instead}>{answers[id].instead}</div>
              ) : (
                answers[id].sentences.map((sentence) => <p key={sentence}>{sentence}</p>)
              )}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
