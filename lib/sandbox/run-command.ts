import 'server-only';
import { spawn, type ChildProcess } from 'node:child_process';
import type { Writable } from 'node:stream';
import { Refusal } from '@/lib/refusal';
import { boxArguments, DEFAULT_LIMITS, FIRST_FILE_DESCRIPTOR, type BoxLimits, type SandboxMode } from './box';

export interface Command {
  /** Run by /bin/sh in /box; programs it makes live until it ends, so that building and running share one script. */
  script: string;
  /** Read-only files below /box. */
  files?: Readonly<Record<string, string | Uint8Array>>;
  wallMs?: number;
  limits?: Partial<BoxLimits>;
  /** Bytes of standard output and error together; past it the box is stopped. */
  outputBytes?: number;
  /** Once `marker` has been printed, `reply` is called once with the output so far, and its text becomes the input. */
  dialogue?: { marker: string; reply: (output: string) => string };
  signal?: AbortSignal;
}

export interface CommandResult {
  /** null where the box was stopped from outside. */
  exitCode: number | null;
  signal: NodeJS.Signals | null;
  timedOut: boolean;
  /** The output limit was passed; what came before it is kept. */
  truncated: boolean;
  stdout: string;
  stderr: string;
  ms: number;
}

const WALL_MS = 10_000;
const OUTPUT_BYTES = 256 * 1024;
/** Boxes of one worker share a user number, those of different workers mostly do not. */
const BOX_UID = 64900 + (process.pid % 64);

const asRoot = () => process.getuid?.() === 0;

async function runInMode(mode: Exclude<SandboxMode, 'unavailable'>, command: Command): Promise<CommandResult> {
  const { files = {}, wallMs = WALL_MS, outputBytes = OUTPUT_BYTES, dialogue, signal } = command;
  signal?.throwIfAborted();
  const fileNames = Object.keys(files);
  const [program, ...args] = boxArguments({
    mode,
    asRoot: asRoot(),
    uid: BOX_UID,
    // One second later than our own clock, for the case that our process is stopped.
    wallSeconds: wallMs / 1000 + 1,
    limits: { ...DEFAULT_LIMITS, ...command.limits },
    fileNames,
    script: command.script,
  });
  const stdio: ('pipe' | 'ignore')[] = [
    dialogue ? 'pipe' : 'ignore',
    'pipe',
    'pipe',
    ...fileNames.map(() => 'pipe' as const),
  ];
  const startedMs = Date.now();
  return new Promise((resolve, reject) => {
    const child: ChildProcess = spawn(program!, args, {
      // The first process inside shows the environment it was started with: it must hold nothing of ours.
      env: { ...({} as NodeJS.ProcessEnv), PATH: '/usr/bin:/bin' },
      cwd: '/',
      detached: true,
      stdio,
    });
    const stop = () => {
      if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return;
      try {
        process.kill(-child.pid, 'SIGKILL');
      } catch {
        // The group ended between the check and the call.
      }
    };
    let timedOut = false;
    let truncated = false;
    let answered = false;
    let bytes = 0;
    const out: Buffer[] = [];
    const err: Buffer[] = [];
    const timer = setTimeout(() => {
      timedOut = true;
      stop();
    }, wallMs);
    signal?.addEventListener('abort', stop, { once: true });

    const take = (into: Buffer[]) => (chunk: Buffer) => {
      const room = outputBytes - bytes;
      into.push(chunk.length > room ? chunk.subarray(0, room) : chunk);
      bytes += Math.min(chunk.length, room);
      if (chunk.length <= room) return;
      truncated = true;
      stop();
    };
    const takeOut = take(out);
    child.stdout?.on('data', (chunk: Buffer) => {
      takeOut(chunk);
      if (!dialogue || answered || !child.stdin) return;
      const soFar = Buffer.concat(out).toString('utf8');
      if (!soFar.includes(dialogue.marker)) return;
      answered = true;
      try {
        child.stdin.end(dialogue.reply(soFar));
      } catch (fault) {
        stop();
        reject(fault);
      }
    });
    child.stderr?.on('data', take(err));
    // A box that ends early closes its pipes while we still write: its exit tells, not the pipe.
    const deaf = (stream: Writable | null) => stream?.on('error', () => undefined);
    deaf(child.stdin);
    fileNames.forEach((name, k) => {
      const pipe = child.stdio[FIRST_FILE_DESCRIPTOR + k] as Writable;
      deaf(pipe);
      pipe.end(files[name]);
    });
    child.on('error', (fault) => {
      clearTimeout(timer);
      reject(fault);
    });
    child.on('close', (exitCode, exitSignal) => {
      clearTimeout(timer);
      signal?.removeEventListener('abort', stop);
      if (signal?.aborted) return reject(signal.reason);
      resolve({
        exitCode,
        signal: exitSignal,
        timedOut,
        truncated,
        stdout: Buffer.concat(out).toString('utf8'),
        stderr: Buffer.concat(err).toString('utf8'),
        ms: Date.now() - startedMs,
      });
    });
  });
}

let probed: Promise<SandboxMode> | undefined;

async function probe(): Promise<SandboxMode> {
  const modes = asRoot() ? (['user-namespaces', 'root-only'] as const) : (['user-namespaces'] as const);
  for (const mode of modes) {
    const answer = await runInMode(mode, { script: 'echo inside' }).catch(() => null);
    if (answer?.exitCode === 0 && answer.stdout === 'inside\n') return mode;
  }
  return 'unavailable';
}

/** How this machine confines commands, tried once for each process. */
export const sandboxMode = (): Promise<SandboxMode> => (probed ??= probe());

/**
 * Runs one script in a box of its own: no network, no files but its own and the system's programs, bounded time,
 * memory, processes and output. What the script does to itself is a result, not an error.
 * @throws {Refusal} 'unavailable', where this machine offers no way to confine a command; it is then not run
 * @throws the signal's reason, where it was aborted
 */
export async function runCommand(command: Command, mode?: SandboxMode): Promise<CommandResult> {
  const chosen = mode ?? (await sandboxMode());
  if (chosen === 'unavailable')
    throw new Refusal(
      'unavailable',
      'This machine offers no sandbox (bubblewrap with user namespaces, or root), so nothing was compiled or run.',
    );
  return runInMode(chosen, command);
}
