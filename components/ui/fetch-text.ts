/**
 * The text at an address of this site.
 * @throws {Error} with the server's sentence where the answer is not 2xx
 */
export async function fetchText(address: string): Promise<string> {
  const answer = await fetch(address);
  const text = await answer.text();
  if (!answer.ok) throw new Error(answer.status === 401 ? 'You are signed out: sign in again.' : sentenceOf(text));
  return text;
}

/** The detail of a problem document (RFC 9457), or the text itself where it is a short one. */
function sentenceOf(text: string): string {
  try {
    const problem: unknown = JSON.parse(text);
    if (problem && typeof problem === 'object' && 'detail' in problem && typeof problem.detail === 'string') {
      return problem.detail;
    }
  } catch {
    // Not JSON: told below.
  }
  return text.length > 0 && text.length < 200 && !text.startsWith('<')
    ? text
    : 'The server did not answer as it should.';
}
