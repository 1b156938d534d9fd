import { Refusal } from '@/lib/refusal';

/** A decision's sentence, trimmed. @throws {Refusal} where it is empty or longer than 1000 characters */
export function decisionSentence(text: string): string {
  const sentence = text.trim();
  if (sentence === '' || sentence.length > 1000)
    throw new Refusal('invalid', 'A decision needs a sentence of at most 1000 characters.', {
      sentence: 'accepted: a sentence of at most 1000 characters',
    });
  return sentence;
}
