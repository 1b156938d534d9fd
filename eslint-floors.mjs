/**
 * The floors of the house as a lint rule: imports go down, never up (DEVELOPERS.md, "Floors").
 *
 * A file's floor follows from its folder. Within `lib` the first line decides: `import 'server-only';` makes a
 * use case, everything else there is a noun and must stay pure.
 */
import fs from 'node:fs';
import path from 'node:path';

/** Each floor and the floors that it may import from. */
const MAY_IMPORT = {
  numerics: ['numerics'],
  noun: ['numerics', 'noun'],
  db: ['numerics', 'noun', 'db'],
  'use case': ['numerics', 'noun', 'db', 'use case'],
  component: ['numerics', 'noun', 'component'],
  app: ['numerics', 'noun', 'db', 'use case', 'component', 'app'],
  program: ['numerics', 'noun', 'db', 'use case', 'component', 'app', 'program'],
  launch: ['launch'],
};

const DRIVERS = ['pg', 'drizzle-orm', 'pg-boss', 'nodemailer', '@node-rs/argon2'];
const FRAMEWORK = ['next', 'next-auth', 'react', 'react-dom', 'server-only'];

/** Packages that a floor knows nothing of; a name covers what lies below it, and `node:` every module of Node. */
const MAY_NOT_USE = {
  numerics: [...DRIVERS, ...FRAMEWORK, 'node:'],
  noun: [...DRIVERS, ...FRAMEWORK, 'node:'],
  db: FRAMEWORK,
  'use case': [],
  component: [...DRIVERS, 'server-only', 'node:'],
  app: ['pg', 'drizzle-orm', 'pg-boss'],
  program: [],
  launch: [...DRIVERS, ...FRAMEWORK],
};

/** Pure all the same: a hash is a function of its text. */
const ALLOWED_EVERYWHERE = new Set(['node:crypto']);
/** The one noun that reads the disk: the shapes of generated files lie there. */
const READS_TEMPLATES = 'lib/codegen/load-template.ts';

/** Files that stand on another floor than their folder says, each for a reason. */
const EXCEPTIONS = {
  // Started from a shell.
  'lib/facts/analyse-files.ts': 'program',
  'lib/people/add-administrator-from-shell.ts': 'program',
  'db/migrate.ts': 'program',
};

const EXTENSIONS = ['', '.ts', '.tsx', '.mjs', '.d.ts'];

function isFile(name) {
  return fs.statSync(name, { throwIfNoEntry: false })?.isFile() ?? false;
}

function startsServerOnly(text) {
  return /^\s*(?:\/\*[\s\S]*?\*\/\s*|\/\/[^\n]*\n\s*)*import ['"]server-only['"]/.test(text);
}

/**
 * The floor of a file, or null where no rule applies (tests, settings of tools).
 * @param name path from the root of the repository, with forward slashes
 * @param text read from disk when left out
 */
export function floorOf(root, name, text) {
  if (name in EXCEPTIONS) return EXCEPTIONS[name];
  if (name.startsWith('lib/numerics/')) return 'numerics';
  if (name.startsWith('lib/launch/')) return 'launch';
  if (name.startsWith('lib/')) {
    const file = path.join(root, name);
    const source = text ?? (isFile(file) ? fs.readFileSync(file, 'utf8') : '');
    return startsServerOnly(source) ? 'use case' : 'noun';
  }
  if (name.startsWith('db/seed/')) return 'program';
  if (name.startsWith('db/')) return 'db';
  if (name.startsWith('components/')) return 'component';
  if (name.startsWith('app/')) return 'app';
  if (['worker.ts', 'mail-catcher.ts', 'proxy.ts', 'instrumentation.ts'].includes(name)) return 'program';
  return null;
}

function resolveOurs(root, from, specifier) {
  const base = specifier.startsWith('@/')
    ? path.join(root, specifier.slice(2))
    : path.resolve(path.dirname(from), specifier);
  const file = EXTENSIONS.map((extension) => base + extension).find(isFile) ?? base;
  return path.relative(root, file).split(path.sep).join('/');
}

const covers = (banned, specifier) =>
  banned.endsWith(':') ? specifier.startsWith(banned) : specifier === banned || specifier.startsWith(`${banned}/`);

/** What is wrong with an import, as a sentence, or null. */
function complaint(root, from, name, floor, specifier) {
  if (!specifier.startsWith('.') && !specifier.startsWith('@/')) {
    if (ALLOWED_EVERYWHERE.has(specifier) || (name === READS_TEMPLATES && specifier.startsWith('node:'))) return null;
    const banned = MAY_NOT_USE[floor].find((one) => covers(one, specifier));
    return banned ? `The floor "${floor}" knows nothing of ${specifier}.` : null;
  }
  const target = resolveOurs(root, from, specifier);
  const targetFloor = floorOf(root, target);
  if (targetFloor === null || MAY_IMPORT[floor].includes(targetFloor)) return null;
  const hint = floor === 'noun' ? " A use case starts with: import 'server-only';" : '';
  return `Imports go down: the floor "${floor}" may not import ${target} (floor "${targetFloor}").${hint}`;
}

const importsGoDown = {
  meta: { type: 'problem', schema: [], messages: { upwards: '{{complaint}}' } },
  create(context) {
    const root = context.cwd;
    const name = path.relative(root, context.filename).split(path.sep).join('/');
    const floor = floorOf(root, name, context.sourceCode.text);
    if (floor === null) return {};
    const check = (node) => {
      const specifier = node.source?.value;
      if (typeof specifier !== 'string') return;
      const text = complaint(root, context.filename, name, floor, specifier);
      if (text) context.report({ node: node.source, messageId: 'upwards', data: { complaint: text } });
    };
    return {
      ImportDeclaration: check,
      ImportExpression: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
    };
  },
};

export const floors = { rules: { 'imports-go-down': importsGoDown } };
