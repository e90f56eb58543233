/** Stored with each forecast; it changes whenever the same scenario may give other numbers. */
export const ENGINE_VERSION = '1.1.0';
