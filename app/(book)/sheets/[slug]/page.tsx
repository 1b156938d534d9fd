import type { Metadata } from 'next';
import { sheetMetadata, SheetPage } from './_components/sheet-page';

export async function generateMetadata({ params }: PageProps<'/sheets/[slug]'>): Promise<Metadata> {
  return sheetMetadata((await params).slug);
}

/** The revision in force, or else the newest that this reader may see. */
export default async function CurrentSheetPage({ params }: PageProps<'/sheets/[slug]'>) {
  return <SheetPage slug={(await params).slug} />;
}
