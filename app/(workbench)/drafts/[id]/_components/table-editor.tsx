'use client';

import { useRef, useState } from 'react';
import type { TableScheme } from '@/lib/entries/definition';
import { LIMITS } from '@/lib/entries/definition';
import type { Problem } from '@/lib/facts/facts';
import { decimalText, symbolText } from '@/lib/facts/reading-texts';
import type { SketchModel } from '@/lib/facts/sketch-model';
import { weightValues } from '@/lib/facts/weight-value';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { FormulaLine } from './formula-line';
import { HeldInput } from './held-input';
import { RuleLines } from './rule-lines';
import { PointSketch } from './point-sketch';
import { Stepper } from './stepper';
import { isComputed, siteKey, siteName, type Site, sitesOf, withSiteTurned, withWeight } from './table-model';

interface TableEditorProps {
  definition: TableScheme;
  problems: readonly Problem[];
  model: SketchModel | null;
  rule: readonly string[];
  /** Letter and value of the parameter that the staff stands at; null where there is none yet. */
  at: { symbol: string; value: number } | null;
  isReadOnly: boolean;
  onChange: (definition: TableScheme) => void;
}

const REACH_MIN = 1;

/** Points and weights: the sketch to press, the weights as a table, the formula as a line, all of one definition. */
export function TableEditor({ definition, problems, model, rule, at, isReadOnly, onChange }: TableEditorProps) {
  const { dims, parameters, common } = CONVENTIONS[definition.equation];
  const sites = sitesOf(definition);
  const needed = {
    levels: Math.max(2, ...sites.map(({ level }) => 2 - level)),
    reach: Math.max(REACH_MIN, ...sites.flatMap(({ offset }) => Math.ceil(Math.abs(offset[0] ?? 0)))),
  };
  const [shown, setShown] = useState({ levels: 3, reach: 2 });
  const [slice, setSlice] = useState<readonly number[]>(Array<number>(dims - 1).fill(0));
  const levels = Math.max(shown.levels, needed.levels);
  const reach = Math.max(shown.reach, needed.reach);
  const table = useRef<HTMLTableElement>(null);
  const values =
    at &&
    weightValues(
      definition,
      sites.map(({ weight }) => weight),
      at.value,
    );

  return (
    <>
      <div className="leafhd">
        <span>Sketch. Press a site to read it, press again to let go</span>
        <span className="steppers">
          <Stepper
            name="levels"
            value={levels}
            min={needed.levels}
            max={LIMITS.levels}
            onStep={(next) => setShown({ ...shown, levels: next })}
          />
          <Stepper
            name="width"
            value={reach}
            min={needed.reach}
            max={LIMITS.offset}
            onStep={(next) => setShown({ ...shown, reach: next })}
          />
        </span>
      </div>
      {slice.map((by, k) => (
        <div key={k} className="slicebar">
          <span>Slice</span>
          <Stepper
            name={`${['j', 'k'][k]} offset`}
            value={by}
            min={-LIMITS.offset}
            max={LIMITS.offset}
            onStep={(next) => setSlice(slice.map((old, j) => (j === k ? next : old)))}
          />
          <span className="q small">
            {sites.filter((site) => site.offset[k + 1] === by).length} of {sites.length} points lie in it
          </span>
        </div>
      ))}
      <PointSketch
        sites={sites}
        dims={dims}
        levels={levels}
        reach={reach}
        slice={slice}
        model={model}
        isReadOnly={isReadOnly}
        onTurn={(level, offset) => onChange(withSiteTurned(definition, level, offset))}
        onEdit={(key) => table.current?.querySelector<HTMLInputElement>(`[data-weight="${key}"]`)?.focus()}
      />
      <RuleLines rule={rule} />
      <div className="wrow">
        <table ref={table}>
          <thead>
            <tr>
              <th scope="col">Point</th>
              <th scope="col">Weight</th>
              <th scope="col" className="r">
                {at ? (
                  <>
                    at <span className="m">{at.symbol}</span> = {decimalText(at.value, 3)}
                  </>
                ) : (
                  'value'
                )}
              </th>
            </tr>
          </thead>
          <tbody>
            {sites.map((site, k) => (
              <WeightRow
                key={siteKey(site.level, site.offset)}
                site={site}
                value={values?.[k] ?? null}
                problem={problems.find(({ pointer }) => pointer.startsWith(`/terms/${site.index}/`)) ?? null}
                isReadOnly={isReadOnly}
                onWeight={(weight) => onChange(withWeight(definition, site, weight))}
              />
            ))}
          </tbody>
        </table>
        <div>
          <FormulaLine
            definition={definition}
            isReadOnly={isReadOnly}
            onTerms={(terms) => onChange({ ...definition, terms })}
          />
          <p className="cap">
            Accepted in weights: numbers,{' '}
            {[...parameters, ...(common ? [common] : [])].map((name) => `${name} (${symbolText(name)})`).join(', ')}
            {Object.keys(definition.fixed ?? {}).map((name) => `, ${name}`)}, + − * / ^ and brackets
            {CONVENTIONS[definition.equation].complex ? ', and i' : ''}.
          </p>
        </div>
      </div>
    </>
  );
}

interface WeightRowProps {
  site: Site;
  value: readonly [number, number] | null;
  problem: Problem | null;
  isReadOnly: boolean;
  onWeight: (weight: string) => void;
}

function valueText([re, im]: readonly [number, number]): string {
  if (im === 0) return decimalText(re, 3);
  return `${re === 0 ? '' : `${decimalText(re, 3)} + `}${decimalText(im, 3)} i`;
}

function WeightRow({ site, value, problem, isReadOnly, onWeight }: WeightRowProps) {
  const name = siteName(site.level, site.offset);
  const key = siteKey(site.level, site.offset);
  const computed = isComputed(site.level, site.offset);
  return (
    <tr>
      <th scope="row" className="point">
        <span className="m">{name}</span>
      </th>
      <td>
        <HeldInput
          className={problem ? 'inp bad' : 'inp'}
          data-weight={key}
          value={site.weight}
          readOnly={isReadOnly}
          aria-label={`Weight at ${name}`}
          aria-invalid={problem ? true : undefined}
          aria-describedby={problem ? `fault-${key}` : undefined}
          onText={onWeight}
        />
        {problem && (
          <p className="fail small" id={`fault-${key}`}>
            {problem.column ? `Column ${problem.column}: ` : ''}
            {problem.message}
          </p>
        )}
      </td>
      <td className="r num">{computed ? 'computed' : value ? valueText(value) : '–'}</td>
    </tr>
  );
}
