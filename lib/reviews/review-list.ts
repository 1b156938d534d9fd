/** The points a maintainer ticks before signing. */
export const REVIEW_POINTS = ['definition', 'facts', 'start-up', 'naming'] as const;
export type ReviewPoint = (typeof REVIEW_POINTS)[number];

export const REVIEW_POINT_TEXT: Readonly<Record<ReviewPoint, string>> = {
  definition: 'The definition is the one in the source, sign by sign.',
  facts: 'The computed facts agree with what the source says of the scheme.',
  'start-up': 'Start-up and boundary: what the code must supply is stated.',
  naming: 'Name, other names and call number are those people will look for.',
};
