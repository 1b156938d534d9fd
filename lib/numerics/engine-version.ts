/**
 * Version of the engine, stored with every set of facts: facts computed by another version are computed again.
 * Raise it whenever any fact of any definition may change.
 */
export const ENGINE_VERSION = '1.0.0';
