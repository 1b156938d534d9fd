import type { Route } from 'next';
import Link from 'next/link';
import { LogPlot } from '@/components/plots/log-plot';
import { CopyText } from '@/components/ui/copy-text';
import { Nothing } from '@/components/ui/nothing';
import { PrintButton } from '@/components/ui/print-button';
import { questionQuery } from '@/lib/shortlist/question';
import type { Requirement } from '@/lib/shortlist/requirement';
import { CONDITION_NAMES, LET_GO_CHANGE, pointsText, type Shortlist } from '@/lib/shortlist/shortlist';
import { AnswerTable, timesText } from './answer-table';
import { errorPlot } from './error-plot';

const RANKED_BY: Readonly<Record<Requirement['rank'], string>> = {
  bytes: 'bytes moved to carry one wavelength through one wavelength of travel',
  memory: 'memory for one wavelength, to the power of the dimensions',
  steps: 'steps for one wavelength of travel',
};
const LEAST: Readonly<Record<Requirement['rank'], string>> = {
  bytes: 'moves the fewest bytes',
  memory: 'keeps the least memory',
  steps: 'takes the fewest steps',
};

const SIDE_BY_SIDE_MAX = 3;

function Sentence({ list, asked }: { list: Shortlist; asked: Requirement }) {
  const [best, second] = list.fits;
  const total = list.fits.length + list.misses.length;
  if (!best?.cost) {
    const { letGo } = list;
    return (
      <p>
        <b>of {total} schemes fit.</b>{' '}
        {letGo ? (
          <>
            Letting go of {CONDITION_NAMES[letGo.condition]} brings {letGo.brings === 1 ? 'one' : letGo.brings},{' '}
            {letGo.best} first.{' '}
            <Link href={`/shortlist?${questionQuery(asked, LET_GO_CHANGE[letGo.condition])}` as Route}>
              Ask without {CONDITION_NAMES[letGo.condition]}
            </Link>
          </>
        ) : (
          'No single condition stands in the way: each of them fails on two or more, or on the error asked.'
        )}
      </p>
    );
  }
  return (
    <p>
      <b>
        of {total} {total === 1 ? 'scheme fits' : 'schemes fit'}.
      </b>{' '}
      {best.candidate.title} {LEAST[asked.rank]}: {pointsText(best.cost.pointsPerWave)} points carry a wave
      {second?.cost && second.relative !== null
        ? ` where ${second.candidate.title} needs ${pointsText(second.cost.pointsPerWave)} (${timesText(second.relative)})`
        : ''}
      .
    </p>
  );
}

/** The answer: how many fit, the first in words, the error curves, and all of them in a table. */
export function Answer({ list, asked, origin }: { list: Shortlist; asked: Requirement; origin: string }) {
  const plot = errorPlot(list.fits.length > 0 ? list.fits : list.misses, asked);
  const query = questionQuery(asked);
  const first = list.fits.slice(0, SIDE_BY_SIDE_MAX).map(({ candidate }) => `entry=${candidate.slug}`);
  return (
    <section className="answer" aria-label="Answer">
      <div className="leafhd">
        <span>Answer</span>
        <span>ranked by {RANKED_BY[asked.rank]}</span>
      </div>
      <div className="verdict">
        <div className="num four">{list.fits.length}</div>
        <div>
          <Sentence list={list} asked={asked} />
          <div className="acts">
            {first.length > 1 && (
              <Link className="btn" href={`/compare?${first.join('&')}` as Route}>
                Side by side
              </Link>
            )}
            <CopyText className="btn lite" text={`${origin}/shortlist?${query}`}>
              Copy link
            </CopyText>
            <a className="btn lite" href={`/shortlist/table?${query}`}>
              CSV
            </a>
            <PrintButton />
          </div>
        </div>
        {plot && (
          <figure>
            <LogPlot data={plot} id="shortlist-error" />
          </figure>
        )}
      </div>
      <AnswerTable list={list} asked={asked} />
      <p className="cap">
        Computed from the exact amplification factors at the step that costs least, waves along the grid and across it.
        Constant coefficients, no boundaries: a bound here is necessary, and not always sufficient.
      </p>
    </section>
  );
}

/** In the place of an answer: the question cannot be answered as it stands. */
export const NoAnswer = ({ children }: { children: React.ReactNode }) => (
  <section className="answer" aria-label="Answer">
    <div className="leafhd">
      <span>Answer</span>
    </div>
    <div className="lone">
      <Nothing />
      {children}
    </div>
  </section>
);
