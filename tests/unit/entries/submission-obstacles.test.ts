import { describe, expect, it } from 'vitest';
import { submissionObstacles } from '@/lib/entries/submission-obstacles';

const ready = { title: 'Lax–Wendroff', notes: 'By Taylor expansion.', references: [] };

describe('what hinders a submission', () => {
  it('is nothing where definition, title and a note are there', () => {
    expect(submissionObstacles(ready, 'facts')).toEqual([]);
  });
  it('leads to the place where each thing is put right', () => {
    expect(submissionObstacles({ title: ' ', notes: '', references: [] }, 'invalid').map(({ place }) => place)).toEqual(
      ['definition', 'title', 'notes'],
    );
    expect(submissionObstacles(ready, 'inconsistent')).toEqual([
      { place: 'definition', sentence: 'The definition does not approximate its equation.' },
    ]);
  });
});
