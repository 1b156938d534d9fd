/** What the browser itself keeps of a draft until the server has it: one place for each window. */
import { type DraftContent } from '@/lib/entries/draft-content';

export interface StoredText {
  /** The version that the text began from. */
  version: number;
  at: number;
  content: unknown;
}

/** Another window that still writes keeps its text fresher than this. */
const LEFT_BEHIND_MS = 15_000;

const prefixOf = (draftId: string) => `levelbook.draft.${draftId}.`;

function windowName(): string {
  const known = sessionStorage.getItem('levelbook.window');
  if (known) return known;
  const name = crypto.randomUUID().slice(0, 8);
  sessionStorage.setItem('levelbook.window', name);
  return name;
}

const ownKey = (draftId: string) => prefixOf(draftId) + windowName();

/** False where the browser has no room or forbids it. */
export function storeText(draftId: string, version: number, content: unknown): boolean {
  try {
    localStorage.setItem(ownKey(draftId), JSON.stringify({ version, at: Date.now(), content } satisfies StoredText));
    return true;
  } catch {
    return false;
  }
}

export function dropText(draftId: string): void {
  try {
    localStorage.removeItem(ownKey(draftId));
  } catch {
    // A browser that forbids the store has kept nothing either.
  }
}

function parse(text: string | null): StoredText | null {
  if (text === null) return null;
  try {
    const value = JSON.parse(text) as Partial<StoredText>;
    return typeof value.version === 'number' && typeof value.at === 'number' && value.content
      ? { version: value.version, at: value.at, content: value.content }
      : null;
  } catch {
    return null;
  }
}

/** Text that never reached the server: of this window, or of one that was closed. Taken over by this window. */
export function takeStoredText(draftId: string): StoredText | null {
  try {
    const own = parse(localStorage.getItem(ownKey(draftId)));
    if (own) return own;
    const left = Object.keys(localStorage)
      .filter((key) => key.startsWith(prefixOf(draftId)))
      .flatMap((key) => {
        const stored = parse(localStorage.getItem(key));
        return stored && Date.now() - stored.at > LEFT_BEHIND_MS ? [{ key, stored }] : [];
      })
      .sort((a, b) => b.stored.at - a.stored.at)[0];
    if (!left) return null;
    localStorage.removeItem(left.key);
    storeText(draftId, left.stored.version, left.stored.content);
    return left.stored;
  } catch {
    return null;
  }
}

/** Stored text is only taken where it has at least the shape of a draft; fields that do not hold yet stay as typed. */
export function asContent(stored: unknown, fallback: DraftContent): DraftContent | null {
  if (typeof stored !== 'object' || stored === null || !('definition' in stored)) return null;
  const content = { ...fallback, ...stored } as DraftContent;
  const isList = Array.isArray(content.synonyms) && Array.isArray(content.references);
  const isText = [content.title, content.gist, content.notes, content.changeNote].every(
    (text) => typeof text === 'string',
  );
  return isList && isText && content.definition.kind === fallback.definition.kind ? content : null;
}

/** Whether two texts are the same to the last sign, whatever the order of their fields. */
export const isSameText = (a: DraftContent, b: DraftContent) => stable(a) === stable(b);

const stable = (value: unknown): string =>
  JSON.stringify(value, (_, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
