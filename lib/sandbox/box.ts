/**
 * What a box is: one command line that shows its command nothing but the system's programs, an empty home and
 * the files it was given. An allow-list: what is not bound here does not exist inside.
 */

/** How this machine can confine a command; `unavailable` means that nothing is run at all. */
export const SANDBOX_MODES = ['user-namespaces', 'root-only', 'unavailable'] as const;
export type SandboxMode = (typeof SANDBOX_MODES)[number];

export interface BoxLimits {
  /** Seconds of processor time of each process. */
  readonly cpuSeconds: number;
  /** Address space of each process; null for programs that reserve far more than they use (address sanitizer). */
  readonly addressSpaceBytes: number | null;
  /** Largest file. */
  readonly fileBytes: number;
  /** Processes and threads together. */
  readonly processes: number;
}

const MiB = 2 ** 20;

export const DEFAULT_LIMITS: BoxLimits = {
  cpuSeconds: 10,
  addressSpaceBytes: 1024 * MiB,
  fileBytes: 32 * MiB,
  processes: 16,
};

const SCRATCH_BYTES = 32 * MiB;
const BOX_BYTES = 128 * MiB;
/** Boxes give way to the pages of the site. */
const NICENESS = 10;

/** The first descriptor through which a file enters; 0, 1 and 2 are the standard streams. */
export const FIRST_FILE_DESCRIPTOR = 3;

const ENVIRONMENT: Readonly<Record<string, string>> = {
  PATH: '/usr/bin:/bin',
  HOME: '/tmp',
  TMPDIR: '/tmp',
  LC_ALL: 'C.UTF-8',
  OMP_NUM_THREADS: '1',
  OPENBLAS_NUM_THREADS: '1',
  PYTHONDONTWRITEBYTECODE: '1',
};

const VIEW = [
  ...['--unshare-ipc', '--unshare-pid', '--unshare-net', '--unshare-uts', '--unshare-cgroup-try'],
  ...['--die-with-parent', '--new-session'],
  ...['--ro-bind', '/usr', '/usr', '--symlink', 'usr/bin', '/bin'],
  ...['--symlink', 'usr/lib', '/lib', '--symlink', 'usr/lib64', '/lib64'],
  // Without the explicit mode the folder is closed to other users, and libraries found by alternatives are not.
  ...['--perms', '0755', '--dir', '/etc'],
  ...['--ro-bind-try', '/etc/alternatives', '/etc/alternatives'],
  ...['--ro-bind-try', '/etc/ld.so.cache', '/etc/ld.so.cache'],
  ...['--proc', '/proc', '--dev', '/dev'],
];

/**
 * The full command line of a box.
 * @param fileNames names below /box; the k-th file is read from descriptor FIRST_FILE_DESCRIPTOR + k
 * @param uid       unprivileged user number the command runs as where we are root; needs no passwd entry
 * @param asRoot    whether the caller is root
 */
export function boxArguments(box: {
  mode: Exclude<SandboxMode, 'unavailable'>;
  asRoot: boolean;
  uid: number;
  wallSeconds: number;
  limits: BoxLimits;
  fileNames: readonly string[];
  script: string;
}): string[] {
  const { mode, asRoot, uid, wallSeconds, limits, fileNames, script } = box;
  const drop = [
    ...['setpriv', `--reuid=${uid}`, `--regid=${uid}`, '--clear-groups', '--inh-caps=-all'],
    ...(mode === 'root-only' ? ['--bounding-set=-all'] : []),
    ...['--no-new-privs', '--'],
  ];
  const privileges =
    mode === 'user-namespaces'
      ? ['--unshare-user', '--disable-userns', '--cap-drop', 'ALL']
      : ['--cap-drop', 'ALL', '--cap-add', 'CAP_SETUID', '--cap-add', 'CAP_SETGID'];
  const files = fileNames.flatMap((name, k) => [
    ...['--perms', '0444', '--file', String(FIRST_FILE_DESCRIPTOR + k), `/box/${name}`],
  ]);
  return [
    // Death of the worker must not leave a box behind.
    ...['/usr/bin/setpriv', '--pdeathsig', 'KILL', '--'],
    ...['/usr/bin/timeout', '--signal=KILL', String(wallSeconds), 'nice', '-n', String(NICENESS)],
    // The limit on processes does not bind root, so the user changes before the box is entered.
    ...(mode === 'user-namespaces' && asRoot ? drop : []),
    ...['bwrap', ...privileges, ...VIEW],
    ...['--size', String(SCRATCH_BYTES), '--perms', '1777', '--tmpfs', '/tmp'],
    ...['--size', String(BOX_BYTES), '--perms', '1777', '--tmpfs', '/box', ...files, '--chdir', '/box'],
    ...['--remount-ro', '/dev', '--remount-ro', '/', '--hostname', 'box', '--clearenv'],
    ...Object.entries(ENVIRONMENT).flatMap(([name, value]) => ['--setenv', name, value]),
    ...['--', ...(mode === 'root-only' ? drop : [])],
    // Where memory runs short, the kernel takes a box before it takes the database.
    ...['choom', '-n', '1000', '--', 'prlimit', `--cpu=${limits.cpuSeconds}`],
    ...(limits.addressSpaceBytes === null ? [] : [`--as=${limits.addressSpaceBytes}`]),
    ...[`--fsize=${limits.fileBytes}`, `--nproc=${limits.processes}`, '--nofile=128', '--core=0'],
    ...['--stack=67108864', '--', '/bin/sh', '-c', script],
  ];
}
