'use client';

import { useState } from 'react';
import useSWR from 'swr';
import { CopyButton } from '@/components/ui/copy-button';
import { fetchText } from '@/components/ui/fetch-text';
import { Options } from '@/components/ui/options';
import { Tabs } from '@/components/ui/tabs';
import { KERNEL_LANGUAGES, type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';
import { Part } from './part';
import type { ShownKernel } from './shown-kernel';

interface KernelPartProps {
  figure: number;
  /** Where marked-up kernels are fetched: "/sheets/leapfrog-central-2/3/kernel". */
  source: string;
  first: ShownKernel;
  aside: string;
  /** One sentence where the revision is not vetted. */
  warning: string | null;
  /** Address that people type, for the curl line. */
  origin: string;
}

const NAMES: Readonly<Record<KernelLanguage, string>> = { c: 'C', fortran: 'Fortran', python: 'Python' };
const OPTION_WORDS = {
  precision: { title: 'Numbers', words: { double: 'real64' } },
  boundary: { title: 'Ends', words: { periodic: 'periodic', caller: 'halo' } },
} as const;
const LINE_HEIGHT = 24;
const TOP = 14;

const fetchShown = async (address: string): Promise<ShownKernel> => JSON.parse(await fetchText(address)) as ShownKernel;

/** The kernel in three languages, with its options, notes in the margin, and the ways to take it. */
export function KernelPart({ figure, source, first, aside, warning, origin }: KernelPartProps) {
  const [language, setLanguage] = useState<KernelLanguage>(first.language);
  const [options, setOptions] = useState(first.kind === 'kernel' ? first.options : KernelOptions.parse({}));
  const query = new URLSearchParams({ language, ...options });
  const isFirst =
    language === first.language &&
    (first.kind === 'none' ||
      Object.entries(first.options).every(([name, value]) => options[name as keyof KernelOptions] === value));
  const { data, error } = useSWR(isFirst ? null : `${source}?${query}`, fetchShown, {
    revalidateOnFocus: false,
    keepPreviousData: true,
  });
  const shown = isFirst ? first : data;

  return (
    <Part id="kernel" figure={figure} name="Kernel" aside={aside}>
      {warning && (
        <p className="banner" role="note">
          <b>{warning}</b>
        </p>
      )}
      <div className="tabs">
        <Tabs
          label="Language"
          panel="kernel-text"
          options={KERNEL_LANGUAGES.map((value) => ({ value, label: NAMES[value] }))}
          value={language}
          onValue={setLanguage}
        />
        <div className="opt">
          {(Object.keys(OPTION_WORDS) as (keyof typeof OPTION_WORDS)[]).map((name) => (
            <Options
              key={name}
              title={OPTION_WORDS[name].title}
              words={OPTION_WORDS[name].words}
              value={options[name]}
              onValue={(value) => setOptions(KernelOptions.parse({ ...options, [name]: value }))}
            />
          ))}
          {shown?.kind === 'kernel' && (
            <span>
              File <b>{shown.fileName}</b>
            </span>
          )}
        </div>
      </div>
      <div className="minitube" />
      <div id="kernel-text" role="tabpanel" aria-label={`Kernel in ${NAMES[language]}`}>
        {shown?.kind === 'kernel' && (
          <div className="kern">
            <pre tabIndex={0} aria-label={`${shown.fileName}, source text`} role="group">
              <code dangerouslySetInnerHTML={{ __html: shown.html }} />
            </pre>
            <div className="notes">
              {shown.notes.map(({ line, text }) => (
                <p key={`${line}:${text}`} style={{ top: TOP + (line - 1) * LINE_HEIGHT }}>
                  {text}
                </p>
              ))}
            </div>
          </div>
        )}
        {shown?.kind === 'none' && <p className="cap nokernel">{shown.reason}</p>}
        {error && <p className="fail small">The kernel could not be fetched: {(error as Error).message}</p>}
      </div>
      {shown?.kind === 'kernel' && (
        <>
          <div className="bar">
            <CopyButton id="copy-kernel" className="btn main" textOf={() => fetchText(shown.address)}>
              Copy kernel
            </CopyButton>
            <a className="btn" href={shown.address} download={shown.fileName}>
              Download {shown.fileName}
            </a>
            <span className="small q">The bound travels in the first line.</span>
          </div>
          <div className="bar take small q">
            <code>{`curl -O -b session.txt '${origin}${shown.address}'`}</code>
            <CopyButton className="word" textOf={() => `curl -O -b session.txt '${origin}${shown.address}'`}>
              Copy the line
            </CopyButton>
            <span>session.txt holds the cookie of your sign-in.</span>
          </div>
        </>
      )}
    </Part>
  );
}
