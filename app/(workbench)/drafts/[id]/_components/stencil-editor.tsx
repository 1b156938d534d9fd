'use client';

import { useId } from 'react';
import type { StencilDefinition } from '@/lib/entries/definition';
import { LIMITS } from '@/lib/entries/definition';
import type { Problem } from '@/lib/facts/facts';
import { HeldInput } from './held-input';

interface StencilEditorProps {
  definition: StencilDefinition;
  problems: readonly Problem[];
  /** Weights that the engine found, where they are left to it. */
  found: readonly string[] | null;
  /** Before labels, where several stencils stand on one page. */
  name?: string;
  isReadOnly: boolean;
  onChange: (definition: StencilDefinition) => void;
}

const AXES = ['i', 'j', 'k'];
const listed = (offset: string | readonly string[]) => (typeof offset === 'string' ? [offset] : [...offset]);
const joined = (offset: string[]) => (offset.length === 1 ? (offset[0] ?? '0') : offset);

/** The next whole offset that is free, right of the last one. */
function nextOffset({ offsets, dims }: StencilDefinition): string | string[] {
  const largest = Math.max(-1, ...offsets.map((offset) => Number(listed(offset)[0])).filter(Number.isFinite));
  return joined([String(Math.floor(largest) + 1), ...Array<string>(dims - 1).fill('0')]);
}

/** Points and weights of a difference; the weights may be left to the engine. */
export function StencilEditor({ definition, problems, found, name = '', isReadOnly, onChange }: StencilEditorProps) {
  const id = useId();
  const { dims, offsets, weights } = definition;
  const own = weights !== null;
  const setOffset = (k: number, axis: number, text: string) =>
    onChange({
      ...definition,
      offsets: offsets.map((offset, j) =>
        j === k ? joined(listed(offset).map((old, a) => (a === axis ? text : old))) : offset,
      ),
    });
  const faultAt = (list: 'offsets' | 'weights', k: number) =>
    problems.find(({ pointer, severity }) => severity === 'error' && pointer.includes(`/${list}/${k}`));

  return (
    <div className="stenciledit">
      <div className="filebar">
        {dims === 1 && definition.operator === undefined && (
          <div className="field short">
            <label htmlFor={`${id}-order`}>{name}Derivative, 0 is interpolation</label>
            <input
              id={`${id}-order`}
              type="number"
              min={0}
              max={8}
              value={definition.derivative ?? 0}
              readOnly={isReadOnly}
              onChange={(event) => {
                const order = Number(event.target.value);
                if (Number.isInteger(order) && order >= 0 && order <= 8) onChange({ ...definition, derivative: order });
              }}
            />
          </div>
        )}
        <label className="tickbox">
          <input
            type="checkbox"
            checked={!own}
            disabled={isReadOnly}
            onChange={(event) =>
              onChange({
                ...definition,
                weights: event.target.checked ? null : offsets.map((_, k) => found?.[k] ?? '0'),
              })
            }
          />
          {name}Weights of the highest order, found by the engine
        </label>
      </div>
      <div className="wrow">
        <table>
          <thead>
            <tr>
              {Array.from({ length: dims }, (_, axis) => (
                <th key={axis} scope="col">
                  Offset <span className="m">{AXES[axis]}</span>
                </th>
              ))}
              <th scope="col">Weight</th>
              <th scope="col">
                <span className="sr">Let go</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {offsets.map((offset, k) => {
              const fault = faultAt('offsets', k) ?? faultAt('weights', k);
              return (
                <tr key={k}>
                  {listed(offset).map((part, axis) => (
                    <td key={axis}>
                      <HeldInput
                        className={faultAt('offsets', k) ? 'inp bad' : 'inp'}
                        value={part}
                        readOnly={isReadOnly}
                        aria-label={`${name}Offset ${AXES[axis]} of point ${k + 1}`}
                        onText={(text) => setOffset(k, axis, text)}
                      />
                    </td>
                  ))}
                  <td>
                    {own ? (
                      <HeldInput
                        className={faultAt('weights', k) ? 'inp bad' : 'inp'}
                        value={weights[k] ?? ''}
                        readOnly={isReadOnly}
                        aria-label={`${name}Weight of point ${k + 1}`}
                        onText={(text) =>
                          onChange({
                            ...definition,
                            weights: offsets.map((_, j) => (j === k ? text : (weights[j] ?? '0'))),
                          })
                        }
                      />
                    ) : (
                      <span className="num">{found?.[k]?.replace('-', '−') ?? '–'}</span>
                    )}
                    {fault && <p className="fail small">{fault.message}</p>}
                  </td>
                  <td>
                    <button
                      type="button"
                      className="word"
                      disabled={isReadOnly || offsets.length === 1}
                      aria-label={`${name}Let go of point ${k + 1}`}
                      onClick={() =>
                        onChange({
                          ...definition,
                          offsets: offsets.filter((_, j) => j !== k),
                          weights: weights?.filter((_, j) => j !== k) ?? null,
                        })
                      }
                    >
                      let go
                    </button>
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
        <p className="cap">
          Offsets are whole numbers, halves for staggered grids, or any fraction. Weights are numbers, fractions such as
          −1/12, or decimals.
        </p>
      </div>
      <button
        type="button"
        className="btn lite"
        disabled={isReadOnly || offsets.length >= LIMITS.nodes}
        onClick={() =>
          onChange({
            ...definition,
            offsets: [...offsets, nextOffset(definition)],
            weights: weights && [...weights, '0'],
          })
        }
      >
        {name}Read one more point
      </button>
    </div>
  );
}
