import type { Metadata } from 'next';
import type { ReactNode } from 'react';
import { Formula } from '@/components/math/formula';
import { db } from '@/db/client';
import { listCatalogLines } from '@/db/queries/entries';
import { requireActor } from '@/lib/auth/require-actor';
import type { CatalogLine } from '@/lib/entries/entry';
import { EQUATION_LATEX } from '@/lib/entries/equation-latex';
import type { Equation } from '@/lib/numerics/equation';
import { CatalogBook } from './_components/catalog-book';

export const metadata: Metadata = { title: 'Catalog' };

/** The equation of a group and its dimensionless numbers, set on the server. */
function groupFormulas(lines: readonly CatalogLine[]): Record<string, ReactNode> {
  const present = [...new Set(lines.map(({ equation }) => equation))].filter((one): one is Equation => one !== null);
  return Object.fromEntries(
    present.map((equation) => [
      equation,
      <>
        <Formula key="equation" latex={EQUATION_LATEX[equation].written} />
        {EQUATION_LATEX[equation].parameters.map((latex) => (
          <span key={latex} className="small q">
            <Formula latex={latex} />
          </span>
        ))}
      </>,
    ]),
  );
}

/** The catalog: every line that this reader may see. */
export default async function CatalogPage() {
  const actor = await requireActor();
  const lines = await listCatalogLines(db, actor);
  return <CatalogBook lines={lines} formulas={groupFormulas(lines)} />;
}
