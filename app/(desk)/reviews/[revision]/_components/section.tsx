import type { ReactNode } from 'react';

interface SectionProps {
  id: string;
  name: string;
  aside?: ReactNode;
  /** Remarks in the right margin; with `hasThreads` they have a column of their own. */
  margin?: ReactNode;
  hasThreads?: boolean;
  children: ReactNode;
}

/** A part of a review under its ruled head, remarks on it in the right margin. */
export const Section = ({ id, name, aside, margin, hasThreads = false, children }: SectionProps) => (
  <section className="sec" id={id} tabIndex={-1} aria-labelledby={`${id}-head`}>
    <header>
      <h2 id={`${id}-head`}>{name}</h2>
      {aside && <span className="aside">{aside}</span>}
    </header>
    <div className={hasThreads ? 'margined' : 'margined alone'}>
      <div>{children}</div>
      {margin && <div className="marginal">{margin}</div>}
    </div>
  </section>
);
