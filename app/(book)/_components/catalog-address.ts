import { useSearchParams } from 'next/navigation';
import { useCallback, useMemo } from 'react';
import { type ConditionKey, type Conditions, CONDITION_KEYS, readConditions } from '@/lib/entries/catalog-conditions';
import { parseSorting, type Sorting } from '@/lib/entries/catalog-sorting';

/** What the address bar says of the catalog; the only place where it is kept. */
export interface CatalogAddress {
  readonly asked: string;
  readonly conditions: Conditions;
  readonly sorting: Sorting;
  readonly ask: (text: string) => void;
  readonly setCondition: (key: ConditionKey, value: string | null) => void;
  readonly clearConditions: () => void;
  readonly sortBy: (sorting: Sorting) => void;
}

export function useCatalogAddress(): CatalogAddress {
  const params = useSearchParams();
  const conditions = useMemo(() => readConditions((key) => params.get(key)), [params]);

  const change = useCallback((edit: (next: URLSearchParams) => void) => {
    const next = new URLSearchParams(window.location.search);
    edit(next);
    const text = next.toString();
    window.history.replaceState(null, '', text ? `?${text}` : window.location.pathname);
  }, []);

  return {
    asked: params.get('look') ?? '',
    conditions,
    sorting: parseSorting(params.get('sort')),
    ask: useCallback((text) => change((next) => put(next, 'look', text)), [change]),
    setCondition: useCallback((key, value) => change((next) => put(next, key, value)), [change]),
    clearConditions: useCallback(() => change((next) => CONDITION_KEYS.forEach((key) => next.delete(key))), [change]),
    sortBy: useCallback(
      (sorting) => change((next) => put(next, 'sort', sorting === 'number' ? null : sorting)),
      [change],
    ),
  };
}

function put(params: URLSearchParams, key: string, value: string | null) {
  if (value) params.set(key, value);
  else params.delete(key);
}
