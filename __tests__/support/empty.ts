/** Stands for `server-only` in tests, which run outside the bundler that understands it. */
export {};
