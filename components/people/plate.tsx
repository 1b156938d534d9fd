import Link from 'next/link';
import { BrandMark } from '@/components/marks/brand-mark';

/** The page of those who are not in yet: the plate of the sign-in page without its picture. */
export const Plate = ({ title, children }: { title: string; children: React.ReactNode }) => (
  <div className="signin">
    <main id="content" className="alone">
      <section className="plate">
        <Link className="brand" href="/sign-in">
          <BrandMark />
          Levelbook
        </Link>
        <div className="pl">
          <h1>{title}</h1>
          {children}
        </div>
      </section>
    </main>
  </div>
);
