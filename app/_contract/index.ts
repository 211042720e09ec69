/** What callers of the server rely on: a schema for every request, reply and error code. */
export * from "./amplitudes";
export * from "./checks";
export * from "./forms";
export * from "./identifiers";
export * from "./library";
export * from "./problem";
export * from "./values";
