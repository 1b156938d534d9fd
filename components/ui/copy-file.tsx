'use client';

import { CopyButton } from './copy-button';
import { fetchText } from './fetch-text';

interface CopyFileProps {
  /** Path of a text file of this site. */
  address: string;
  className: string;
  children: React.ReactNode;
}

/** A copy button for a file of this site; for server components, which cannot pass functions. */
export const CopyFile = ({ address, className, children }: CopyFileProps) => (
  <CopyButton className={className} textOf={() => fetchText(address)}>
    {children}
  </CopyButton>
);
