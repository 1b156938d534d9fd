import { AskForm } from '@/components/ui/ask-form';
import type { CandidateRow } from '@/db/queries/candidates';
import { symbolText } from '@/lib/facts/reading-texts';
import { coefficientKind, type RunField, type RunQuestion } from '@/lib/budgets/run-question';
import { boundWords } from '@/lib/shortlist/candidate';

const EQUATION_WORDS: Readonly<Record<string, string>> = {
  advection: 'Advection',
  diffusion: 'Diffusion',
  wave: 'Wave',
  schrodinger: 'Schrödinger',
  airy: 'Airy',
  hyperdiffusion: 'Hyperdiffusion',
};
function equationWords(equation: string): string {
  const [name = '', dims] = equation.split('-');
  return `${EQUATION_WORDS[name] ?? name}${dims ? `, ${dims[0]} dimensions` : ''}`;
}

interface GivenProps {
  rows: readonly CandidateRow[];
  own: CandidateRow;
  question: RunQuestion;
  partners: readonly CandidateRow[];
  partner: string;
}

/** What is given: the scheme, the run and the machine, in the user's own units; works without scripts. */
export function GivenForm({ rows, own, question, partners, partner }: GivenProps) {
  const symbol = symbolText(own.facts.stability.parameter ?? 'lambda');
  const bound = boundWords(own.facts);
  const kind = coefficientKind(own.equation);
  const groups = [...new Set(rows.map(({ equation }) => equation))].map((equation) => ({
    words: equationWords(equation),
    members: rows.filter((row) => row.equation === equation),
  }));
  const sides = ['Length', 'Length × width', 'Length × width × height'][own.summary.dims - 1]!;
  const field = (name: RunField, label: string, placeholder?: string) => (
    <GivenField name={name} label={label} placeholder={placeholder} question={question} />
  );
  return (
    <AskForm action="/budget" label="Given" className="given" values={{ ...question.texts, scheme: own.slug, partner }}>
      <div className="field wide">
        <label htmlFor="given-scheme">Scheme</label>
        <select id="given-scheme" name="scheme" defaultValue={own.slug}>
          {groups.map(({ words, members }) => (
            <optgroup key={words} label={words}>
              {members.map((row) => (
                <option key={row.slug} value={row.slug}>
                  {row.callNumber} {row.title}
                </option>
              ))}
            </optgroup>
          ))}
        </select>
      </div>
      {field('extent', sides)}
      {field('speed', kind === 'speed' ? 'Speed, or several' : kind === 'diffusivity' ? 'Diffusivity' : 'Coefficient')}
      {field('wave', kind === 'speed' ? 'Highest tone or shortest wave' : 'Shortest wave')}
      {field('time', kind === 'speed' ? 'Time or way to travel' : 'Time to march')}
      {field('error', kind === 'speed' ? 'Drift or error allowed' : 'Error allowed')}
      {field('number', `${kind === 'speed' ? 'CFL number' : 'Number'} ${symbol}, ${bound}`, 'nine tenths of it')}
      {field('spacing', 'Spacing Δx', 'from the error')}
      {field('smallest', 'Smallest Δx ÷ Δx')}
      {field('node', 'Node: bandwidth, memory')}
      {field('nodes', 'Nodes')}
      {partners.length > 0 && (
        <>
          {field('diffusivity', 'With a diffusivity', 'none')}
          <div className="field">
            <label htmlFor="given-partner">Diffused by</label>
            <select id="given-partner" name="partner" defaultValue={partner}>
              {partners.map((row) => (
                <option key={row.slug} value={row.slug}>
                  {row.callNumber} {row.title}
                </option>
              ))}
            </select>
          </div>
        </>
      )}
      <div className="acts">
        <button type="submit" className="btn">
          Compute
        </button>
      </div>
    </AskForm>
  );
}

function GivenField({
  name,
  label,
  placeholder,
  question,
}: {
  name: RunField;
  label: string;
  placeholder?: string | undefined;
  question: RunQuestion;
}) {
  const fault = question.faults[name];
  return (
    <div className={fault ? 'field bad' : 'field'}>
      <label htmlFor={`given-${name}`}>{label}</label>
      <input
        id={`given-${name}`}
        name={name}
        defaultValue={question.texts[name]}
        placeholder={placeholder}
        maxLength={120}
        autoComplete="off"
        aria-invalid={fault !== undefined}
        aria-describedby={fault ? `given-${name}-fault` : undefined}
      />
      {fault && (
        <p className="hint" id={`given-${name}-fault`} role="alert">
          {fault}
        </p>
      )}
    </div>
  );
}
