import type { Metadata } from 'next';
import { Letters } from '@/components/math/letters';
import { DEFINITION_CHAPTERS } from '@/lib/facts/definitions';

export const metadata: Metadata = { title: 'Definitions' };

/** What each reading of a sheet means and how it is found. */
export default function DefinitionsPage() {
  return (
    <div className="pages definitions">
      <div className="title">
        <div>
          <h1>Definitions</h1>
          <p className="lead">What each reading of a sheet means, and how the engine comes to it.</p>
        </div>
      </div>
      {DEFINITION_CHAPTERS.map(({ title, definitions }) => (
        <section key={title} className="sec" aria-label={title}>
          <header>
            <h2>{title}</h2>
          </header>
          {definitions.map((definition) => (
            <article key={definition.id} id={definition.id} className="defined" tabIndex={-1}>
              <h3>{definition.title}</h3>
              {definition.text.map((paragraph) => (
                <p key={paragraph}>
                  <Letters text={paragraph} />
                </p>
              ))}
              <p className="small q">
                <Letters text={definition.obtained} />
              </p>
            </article>
          ))}
        </section>
      ))}
    </div>
  );
}
