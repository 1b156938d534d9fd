/** The comment at the head of a time method's kernel. */
import { C } from './c';
import { coefficientSource } from './coefficient';
import { infix, type Assignment, type Dialect } from './expression-tree';
import { entry, fileEnd } from './header-text';
import type { KernelLanguage } from './kernel-request';
import type { MethodPlan } from './method-plan';
import { abscissa, target, type MethodContext } from './method-view';

function formula(plan: MethodPlan): string[] {
  const dialect: Dialect = { literal: C.literal, element: (array) => array };
  const where = plan.coefficients.map(({ name, value }) => `${name} = ${coefficientSource(value, ['dt'], C.literal)}`);
  const text = (a: Assignment) => `${target(a)} = ${infix(a.node, dialect)}`;
  const lines =
    plan.shape === 'runge-kutta'
      ? plan.stages.flatMap(({ c, source, slope, assignments }, k) =>
          entry(
            k === 0 ? 'Formula' : '',
            `${slope} = f(${abscissa(c, 'c')}, ${source}); ${assignments.map(text).join('; ')}`,
          ),
        )
      : entry('Formula', `f = f(t, u); ${text(plan.assignment)}`);
  return [...lines, ...(where.length > 0 ? entry('', `with ${where.join(', ')}`) : [])];
}

const CALLBACK: Readonly<Record<KernelLanguage, string>> = {
  c: 'rhs(n, t, u, f, context) writes f = du/dt at (t, u); context is handed through.',
  fortran: 'call rhs(n, t, u, f) sets f = du/dt at (t, u); use host association for what else it needs.',
  python: 'rhs(t, u, out=f) writes f = du/dt at (t, u).',
};

export function methodHeader({ input, facts, plan, prefix }: MethodContext, language: KernelLanguage): string[] {
  const limit = (text: string | null, exact: string | null) =>
    text === null
      ? 'unbounded'
      : exact && exact !== text
        ? `${exact} = ${Number(Number(text).toPrecision(6))}`
        : String(Number(Number(text).toPrecision(6)));
  const storage =
    plan.shape === 'runge-kutta'
      ? `${plan.work.length + 1} arrays of n doubles: u, advanced in place, and ${plan.work.join(', ')} as work space (first in the list, u last).`
      : `${plan.levels} level${plan.levels > 1 ? 's' : ''} of u and ${plan.slopes} slope${plan.slopes > 1 ? 's' : ''}, n doubles each, the oldest first; rotated after each step, the oldest overwritten.`;
  const calling: Readonly<Record<KernelLanguage, string[]>> =
    plan.shape === 'runge-kutta'
      ? {
          c: [`status = ${prefix}_run(nsteps, n, t, dt, level, rhs, context);`],
          fortran: [`call ${prefix}_run(nsteps, n, t, dt, u, rhs, status)`],
          python: ['levels = run(nsteps, levels, t, dt, rhs)'],
        }
      : {
          c: [`status = ${prefix}_run(nsteps, n, t, dt, level, slope, rhs, context);`],
          fortran: [`call ${prefix}_run(nsteps, n, t, dt, u, f, newest, recent, rhs, status)`],
          python: ['levels, slopes = run(nsteps, levels, slopes, t, dt, rhs)'],
        };
  const start =
    plan.shape === 'runge-kutta' || !plan.start
      ? 'none.'
      : `call start ${plan.steps - 1 === 1 ? 'once' : `${plan.steps - 1} times`} before the first step, with t advancing by dt: one Runge-Kutta step of order ${plan.startOrder} that also keeps its slope.`;
  return [
    ...entry('Entry', `${input.callNumber}, revision ${input.revision}: ${input.title} (double precision).`),
    ...entry('Equation', "u' = f(t, u) for n unknowns; dt of either sign."),
    ...formula(plan),
    ...entry(
      'Order',
      `${facts.orderLinear} on linear problems${facts.orderNonlinear === null ? '' : `, ${facts.orderNonlinear} on nonlinear ones`}.`,
    ),
    ...entry(
      'Stable',
      `dt times the eigenvalues of f within: imaginary axis ${limit(facts.imaginaryLimit, facts.imaginaryLimitExact)}, negative real axis ${limit(facts.realLimit, facts.realLimitExact)}.`,
    ),
    ...(facts.zeroStable
      ? []
      : entry('STABILITY', 'NOT ZERO-STABLE: errors grow without bound as dt goes to 0. Do not march with it.')),
    ...entry('Callback', CALLBACK[language]),
    ...entry('Storage', storage),
    ...entry('Start-up', start),
    ...entry('Calling', calling[language].join(' ')),
    ...entry('', "The eigenvalues are the caller's, so that no bound is checked here."),
    ...fileEnd(input, language),
  ];
}
