/** Stands for the package `server-only`, which throws wherever Next's bundler does not replace it. */
export const serverOnly = true;
