'use client';

import { useEffect, useRef, useState } from 'react';
import { AnalysisClient } from '@/lib/facts/analysis-client';
import type { LiveAnalysis } from '@/lib/facts/live-analysis';

const PAUSE_MS = 120;

export interface Live {
  /** The last answer, which may be of an earlier text while `isBehind`. */
  analysis: LiveAnalysis | null;
  isBehind: boolean;
  fault: string | null;
}

/** Facts of a definition, computed beside the typing. */
export function useLiveAnalysis(definition: unknown): Live {
  const client = useRef<AnalysisClient | null>(null);
  const [heard, setHeard] = useState<{ of: unknown; analysis: LiveAnalysis | null; fault: string | null }>({
    of: null,
    analysis: null,
    fault: null,
  });

  useEffect(
    () => () => {
      client.current?.close();
      client.current = null;
    },
    [],
  );
  useEffect(() => {
    const timer = setTimeout(() => {
      client.current ??= new AnalysisClient();
      client.current.ask(definition, (answer) =>
        setHeard((before) =>
          answer.kind === 'analysis'
            ? { of: definition, analysis: answer.analysis, fault: null }
            : { of: definition, analysis: before.analysis, fault: answer.message },
        ),
      );
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [definition]);

  return { analysis: heard.analysis, isBehind: heard.of !== definition, fault: heard.fault };
}
