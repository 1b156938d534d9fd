/** Release of the generator: it changes whenever the text of any kernel may change. */
export const GENERATOR_RELEASE = '1.0.0';
