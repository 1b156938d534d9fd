/** Raised when the same definition may give other facts; stored beside the facts that it computed. */
export const ENGINE_VERSION = '1.1.0';
