'use client';

import BookErrorPage from '@/app/(book)/error';

/** Within the frame: the head stays, the page says what went wrong. */
export default function HouseErrorPage(props: React.ComponentProps<typeof BookErrorPage>) {
  return <BookErrorPage {...props} />;
}
