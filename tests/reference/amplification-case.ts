/** Reference values of amplification, stability, growth and dissipation: exact or 40-digit computations beside published sources. */
import { readFileSync } from 'node:fs';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';

type Side = 'lo' | 'hi';
export type ReferenceInterval = { [S in Side]: string | null } & { [S in Side as `${S}HasClosedForm`]: boolean } & {
  [S in Side as `${S}Included`]?: boolean;
} & { [S in Side as `${S}Why`]?: string } & { [S in Side as `${S}Theta`]?: number[] };

export interface AmplificationCase {
  title: string;
  source: string;
  definition: unknown;
  stability: {
    kind: string;
    verdict: string;
    intervals?: ReferenceInterval[];
    isolated?: number[];
    region?: string;
    lambdaMaxAtR?: Record<string, number>;
    points?: { parameters: Record<string, string>; stable: boolean }[];
  };
  growth?: Partial<Record<'positive' | 'negative', { q: string; growthAt: Record<string, number> }>>;
  dissipation?: {
    at: Record<string, string>;
    principalRootDampingOrder: number | null;
    maxModulusForThetaGt02: number;
    kreissDissipative: boolean;
    kreissOrder: number | null;
    rootsOnUnitCircleAtTheta0: number;
  };
  samples: {
    parameters: Record<string, string>;
    theta: string[];
    roots: [number, number][];
    maxModulus: number;
    principalRoot?: [number, number];
    relativePhaseSpeed?: number;
    relativeDecayRate?: number;
  }[];
}

export const CASES = JSON.parse(
  readFileSync(new URL('./values/scheme-amplification.json', import.meta.url), 'utf8'),
) as AmplificationCase[];

export function schemeFrom(definition: unknown): CanonicalScheme {
  const { scheme, problems } = canonicalScheme(SchemeDefinition.parse(definition));
  if (!scheme) throw new Error(problems.map((p) => p.message).join(' '));
  return scheme;
}
