/** Runs once when a web server starts: wrong settings end it here, with a sentence each, and not at the first visit. */
export async function register() {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { env } = await import('@/lib/env');
  env();
}
