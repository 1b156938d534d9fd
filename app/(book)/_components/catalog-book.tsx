'use client';

import { useRouter } from 'next/navigation';
import { type ReactNode, useCallback, useDeferredValue, useEffect, useMemo, useRef, useState } from 'react';
import { type KeyDeed, useKeys } from '@/components/ui/keys';
import { conditionToLetGo, conditionsOf, countOptions, linesMeeting } from '@/lib/entries/catalog-conditions';
import { groupLines } from '@/lib/entries/catalog-groups';
import { catalogSearch } from '@/lib/entries/catalog-search';
import { sortLines } from '@/lib/entries/catalog-sorting';
import type { CatalogLine } from '@/lib/entries/entry';
import { useCatalogAddress } from './catalog-address';
import { ConditionBand, NarrowConditions } from './condition-band';
import { FacingLeaf } from './facing-leaf';
import { LineList } from './line-list';
import { LookFor } from './look-for';
import { NothingFound } from './nothing-found';
import { PageCheck } from './page-check';

interface CatalogBookProps {
  lines: readonly CatalogLine[];
  formulas: Readonly<Record<string, ReactNode>>;
}

const ADDRESS_PAUSE_MS = 250;

/** The catalog: what is looked for, the conditions in force, the lines they leave and the chosen one drawn. */
export function CatalogBook({ lines, formulas }: CatalogBookProps) {
  const { asked, conditions: inForce, sorting, ask, setCondition, clearConditions, sortBy } = useCatalogAddress();
  const [text, setText] = useState(asked);
  const wanted = useDeferredValue(text);
  const keepText = useTextInAddress(text, asked, ask);

  const conditions = useMemo(() => conditionsOf(lines), [lines]);
  const search = useMemo(() => catalogSearch(lines), [lines]);
  const found = useMemo(() => search(wanted), [search, wanted]);
  const left = useMemo(() => linesMeeting(found, conditions, inForce), [found, conditions, inForce]);
  const isRanked = wanted.trim() !== '' && sorting === 'number';
  const groups = useMemo(
    () => groupLines(isRanked ? left : sortLines(left, sorting), isRanked),
    [left, sorting, isRanked],
  );
  const shown = useMemo(() => groups.flatMap((group) => group.lines), [groups]);

  const [slug, setSlug] = useState<string | null>(null);
  const chosen = shown.find((line) => line.slug === slug) ?? shown[0] ?? null;
  const field = useRef<HTMLInputElement>(null);
  useListKeys(shown, chosen, setSlug, field, keepText);

  return (
    <>
      <LookFor field={field} text={text} onText={setText} shown={shown.length} total={lines.length} />
      <ConditionBand conditions={countOptions(found, conditions, inForce)} onCondition={setCondition} />
      <NarrowConditions
        conditions={countOptions(found, conditions, inForce)}
        onCondition={setCondition}
        onClear={clearConditions}
      />
      <div className="book" onClickCapture={keepText}>
        <section className="lines" aria-label="Entries">
          {shown.length > 0 ? (
            <LineList
              groups={groups}
              formulas={formulas}
              sorting={sorting}
              onSort={sortBy}
              chosen={chosen?.slug ?? null}
              onChoose={setSlug}
            />
          ) : (
            <NothingFound
              asked={wanted.trim()}
              inForce={Object.keys(inForce).length}
              letGo={conditionToLetGo(found, conditions, inForce)}
              onCondition={setCondition}
              onText={setText}
              withoutText={linesMeeting(lines, conditions, inForce).length}
            />
          )}
          <PageCheck lines={shown} />
        </section>
        <aside className="right" aria-label="The chosen line">
          {chosen && <FacingLeaf key={chosen.slug} line={chosen} />}
        </aside>
      </div>
    </>
  );
}

/**
 * Writes the text to the address once typing pauses.
 * @returns writes it at once: a pending change of the address would cancel a page that is being opened
 */
function useTextInAddress(text: string, asked: string, ask: (text: string) => void): () => void {
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => {
    if (text !== asked) timer.current = setTimeout(() => ask(text), ADDRESS_PAUSE_MS);
    return () => clearTimeout(timer.current);
  }, [text, asked, ask]);
  return useCallback(() => {
    clearTimeout(timer.current);
    if (text !== asked) ask(text);
  }, [text, asked, ask]);
}

/** The keys of the list: `/`, j and k or arrows, Enter, c. */
function useListKeys(
  shown: readonly CatalogLine[],
  chosen: CatalogLine | null,
  choose: (slug: string) => void,
  field: React.RefObject<HTMLInputElement | null>,
  keepText: () => void,
) {
  const router = useRouter();
  const move = useCallback(
    (step: 1 | -1) => {
      const at = chosen ? shown.indexOf(chosen) : -1;
      const next = shown[Math.max(0, Math.min(shown.length - 1, at + step))];
      if (!next) return;
      choose(next.slug);
      const row = document.getElementById(`line-${next.slug}`);
      row?.focus({ preventScroll: true });
      row?.scrollIntoView({ block: 'nearest' });
    },
    [shown, chosen, choose],
  );
  const deeds = useMemo<KeyDeed[]>(
    () => [
      { keys: ['/'], label: 'Look for something', run: () => field.current?.focus() },
      { keys: ['j', 'ArrowDown'], label: 'Next line', run: () => move(1) },
      { keys: ['k', 'ArrowUp'], label: 'Line before', run: () => move(-1) },
      {
        keys: ['Enter'],
        label: 'Open the sheet',
        run: () => {
          keepText();
          if (chosen) router.push(`/sheets/${chosen.slug}`);
        },
      },
      { keys: ['c'], label: 'Copy the C kernel', run: () => document.getElementById('copy-chosen')?.click() },
    ],
    [move, chosen, router, field, keepText],
  );
  useKeys(deeds);
}
