import Link from 'next/link';
import { BrandMark } from '@/components/marks/brand-mark';
import type { Actor } from '@/lib/people/actor';
import { AccountMenu } from './account-menu';
import { NarrowMenu } from './narrow-menu';
import type { SignOutEverywhere } from './sign-out-buttons';
import { ThemeButton } from './theme-button';
import { ToolList } from './tool-list';

interface HeadProps {
  actor: Actor;
  /** How many things wait at a tool, by its address. */
  waiting?: Readonly<Record<string, number>>;
  signOutEverywhere: SignOutEverywhere;
}

/** The head of every page: words above a long tube, the bubble under the tool that is open. */
export function Head({ actor, waiting, signOutEverywhere }: HeadProps) {
  return (
    <header className="head">
      <a className="skip" href="#content">
        Skip to the page
      </a>
      <div className="wrap row">
        <Link className="brand" href="/">
          <BrandMark />
          Levelbook
        </Link>
        <nav className="tools" aria-label="Tools">
          <ToolList role={actor.role} waiting={waiting} />
        </nav>
        <div className="end">
          <ThemeButton />
          <AccountMenu name={actor.name} role={actor.role} signOutEverywhere={signOutEverywhere} />
        </div>
        <NarrowMenu name={actor.name} role={actor.role} waiting={waiting} signOutEverywhere={signOutEverywhere} />
      </div>
      <div className="tube" />
    </header>
  );
}
