import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { CopyText } from '@/components/ui/copy-text';
import { Nothing } from '@/components/ui/nothing';
import { PrintButton } from '@/components/ui/print-button';
import { db } from '@/db/client';
import { listBudgetCases } from '@/db/queries/budget-cases';
import { listCandidates } from '@/db/queries/candidates';
import { requireActor } from '@/lib/auth/require-actor';
import { otherWays } from '@/lib/budgets/answer-budget';
import { toleranceText } from '@/lib/budgets/budget-words';
import { readBudget } from '@/lib/budgets/read-budget';
import { env } from '@/lib/env';
import { symbolText } from '@/lib/facts/reading-texts';
import { EQUATIONS } from '@/lib/numerics/equation';
import { type Budget, BudgetAnswer, BudgetLead } from './_components/budget-answer';
import { Cases } from './_components/cases';
import { GivenForm } from './_components/given-form';

export const metadata: Metadata = { title: 'Run budget' };

/** One scheme and one run: what it takes on a machine, and what halving the spacing does. */
export default async function BudgetPage({ searchParams }: PageProps<'/budget'>) {
  const actor = await requireActor();
  const query = await searchParams;
  const valueOf = (name: string) => {
    const value = query[name];
    return Array.isArray(value) ? value[0] : value;
  };
  const [rows, cases] = await Promise.all([listCandidates(db, actor, EQUATIONS), listBudgetCases(db, actor.id)]);
  const read = readBudget(rows, valueOf);
  const origin = env().NEXTAUTH_URL.replace(/\/$/, '');
  if (!read)
    return (
      <div className="lone">
        <Nothing />
        <p>The book has no scheme that you may see, and so nothing to budget.</p>
        <Link href="/">To the catalog</Link>
      </div>
    );

  const { own, question, subject, partners, partner, run, parameter, spacing, obstacle } = read;
  const budget: Budget | null =
    run && subject && parameter !== null && spacing !== null
      ? {
          run,
          subject,
          tolerance: question.tolerance,
          parameter,
          spacing,
          symbol: symbolText(own.facts.stability.parameter ?? 'lambda'),
          name: own.callNumber,
          after: question.texts.time,
        }
      : null;
  const others = budget ? await otherWays(rows, own, budget.run, budget.tolerance) : [];
  const caseName = (valueOf('case') ?? '').slice(0, 80);

  return (
    <div className="budget">
      <div className="title">
        <div>
          <div className="call">
            <span>
              <Link href={`/sheets/${own.slug}` as Route}>
                {own.callNumber} {own.title}
              </Link>
            </span>
            {caseName && <span>case {caseName}</span>}
          </div>
          <h1>Run budget</h1>
        </div>
        {budget ? (
          <BudgetLead budget={budget} />
        ) : (
          <p className="lead budl" role="status">
            {obstacle ?? 'Not computed: something cannot be read as it stands. It is marked where it was typed.'}
          </p>
        )}
      </div>
      <GivenForm rows={read.offered} own={own} question={question} partners={partners} partner={partner} />
      {budget && (
        <>
          <div className="acts budget-acts">
            <CopyText className="btn lite" text={`${origin}/budget?${read.queryOf()}`}>
              Copy link
            </CopyText>
            <a className="btn lite" href={`/budget/table?${read.queryOf()}`}>
              CSV
            </a>
            <PrintButton />
          </div>
          <BudgetAnswer
            budget={budget}
            others={others}
            addressOf={(slug, number) =>
              `/budget?${read.queryOf({ scheme: slug, number: String(Number(number.toPrecision(4))), spacing: '' })}`
            }
          />
          <Cases
            cases={cases}
            question={read.queryOf()}
            name={caseName || `${own.callNumber}, ${toleranceText(question.tolerance)} after ${question.texts.time}`}
            origin={origin}
          />
        </>
      )}
      {!budget && cases.length > 0 && (
        <p className="small q">
          Kept cases:{' '}
          {cases.map((kept) => (
            <Link key={kept.id} prefetch={false} href={`/budget/cases/${kept.id}` as Route}>
              {kept.name}{' '}
            </Link>
          ))}
        </p>
      )}
    </div>
  );
}
