import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { sheetMetadata, SheetPage } from '../_components/sheet-page';

type Props = PageProps<'/sheets/[slug]/[revision]'>;

const numberOf = (text: string) => (/^[1-9]\d{0,5}$/.test(text) ? Number(text) : null);

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { slug, revision } = await params;
  return sheetMetadata(slug, numberOf(revision) ?? undefined);
}

/** One revision by its number. */
export default async function RevisionSheetPage({ params }: Props) {
  const { slug, revision } = await params;
  const number = numberOf(revision);
  if (number === null) notFound();
  return <SheetPage slug={slug} revision={number} />;
}
