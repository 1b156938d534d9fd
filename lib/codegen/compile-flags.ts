/** How kernels are built: release, warnings as errors, and the checks at run time. All languages are C11, Fortran 2018 and Python 3. */
import type { KernelLanguage } from './kernel-request';

export interface BuildFlags {
  /** Program that is called. */
  readonly compiler: string;
  /** Recorded flags: under these the three languages agree bit for bit. */
  readonly release: readonly string[];
  readonly warnings: readonly string[];
  /** Slow build with checks at run time. */
  readonly checked: readonly string[];
  /** Libraries, after the sources. */
  readonly libraries: readonly string[];
}

export const BUILD_FLAGS: Readonly<Record<KernelLanguage, BuildFlags>> = {
  c: {
    compiler: 'gcc',
    release: ['-std=c11', '-O3', '-march=native', '-ffp-contract=off'],
    warnings: ['-Wall', '-Wextra', '-Wpedantic', '-Wconversion', '-Werror'],
    checked: [
      '-std=c11',
      '-O1',
      '-g',
      '-ffp-contract=off',
      '-fsanitize=address,undefined',
      '-fno-sanitize-recover=all',
      '-fno-omit-frame-pointer',
    ],
    libraries: ['-lm'],
  },
  fortran: {
    compiler: 'gfortran',
    release: ['-std=f2018', '-O3', '-march=native', '-ffp-contract=off'],
    warnings: ['-Wall', '-Wextra', '-Wconversion-extra', '-Werror'],
    checked: ['-std=f2018', '-O1', '-g', '-ffp-contract=off', '-fcheck=all', '-fbacktrace'],
    libraries: [],
  },
  python: {
    compiler: 'python3',
    release: ['-I'],
    warnings: ['-W', 'error'],
    checked: ['-X', 'dev'],
    libraries: [],
  },
};
