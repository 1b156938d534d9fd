interface PartProps {
  id: string;
  figure: number;
  name: string;
  /** A short fact at the right of the head. */
  aside?: React.ReactNode;
  children: React.ReactNode;
}

/** A part of a sheet under its ruled head. */
export const Part = ({ id, figure, name, aside, children }: PartProps) => (
  <section className="sec" id={id} tabIndex={-1} aria-labelledby={`${id}-head`}>
    <header>
      <span className="n" aria-hidden="true">
        {figure}
      </span>
      <h2 id={`${id}-head`}>{name}</h2>
      {aside && <span className="aside">{aside}</span>}
    </header>
    {children}
  </section>
);
