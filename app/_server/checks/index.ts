/** Checks: started, followed, stopped; the queue and its workers are behind. */
export { getCheck, watchCheck } from "./read";
export { cancelCheck, startCheck } from "./start";
