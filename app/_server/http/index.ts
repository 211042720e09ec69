/** What route handlers are made of; they hold no logic of their own. */
export { largestBody, readJsonBody } from "./body";
export { eventStream, lastEventId } from "./events";
export { file, idempotencyKeyOf, json, outcome, problem, problemReply, route } from "./reply";
