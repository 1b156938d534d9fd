import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { requireActor } from '@/lib/auth/require-actor';
import { env } from '@/lib/env';
import { answerShortlist } from '@/lib/shortlist/answer-shortlist';
import { questionQuery, readQuestion } from '@/lib/shortlist/question';
import { equationOf, type Requirement } from '@/lib/shortlist/requirement';
import { Answer, NoAnswer } from './_components/answer';
import { ProblemForm } from './_components/problem-form';

export const metadata: Metadata = { title: 'Shortlist' };

const DIMENSIONS = ['1', '2', '3'] as const;

/** Which scheme: the problem on the left, the schemes that solve it within the error on the right. */
export default async function ShortlistPage({ searchParams }: PageProps<'/shortlist'>) {
  const actor = await requireActor();
  const query = await searchParams;
  const question = readQuestion((name) => {
    const value = query[name];
    return Array.isArray(value) ? value[0] : value;
  });
  const { asked } = question;
  const isReadable = Object.keys(question.faults).length === 0;
  const answer = isReadable ? await answerShortlist(actor, asked) : null;

  return (
    <div className="duo">
      <ProblemForm question={question} />
      {answer === null ? (
        <NoAnswer>
          <p>
            Not answered yet: something of the question cannot be read as it stands. It is marked where it was typed.
          </p>
        </NoAnswer>
      ) : !answer.known ? (
        <NoAnswer>
          <p>
            The book has no {asked.equation} in {asked.dims} dimensions. <OtherDimensions asked={asked} />
          </p>
        </NoAnswer>
      ) : answer.list.fits.length + answer.list.misses.length === 0 ? (
        <NoAnswer>
          <p>The book has no scheme for this equation that you may see.</p>
        </NoAnswer>
      ) : (
        <Answer list={answer.list} asked={asked} origin={env().NEXTAUTH_URL.replace(/\/$/, '')} />
      )}
    </div>
  );
}

function OtherDimensions({ asked }: { asked: Requirement }) {
  return DIMENSIONS.filter((dims) => equationOf({ equation: asked.equation, dims: Number(dims) as 1 | 2 | 3 })).map(
    (dims) => (
      <Link key={dims} href={`/shortlist?${questionQuery(asked, { dims })}` as Route}>
        Ask in {dims}{' '}
      </Link>
    ),
  );
}
