/** A process that submits `count` documents under their own keys, one after the other, from `first` on; it may be killed and started again. */
import { localUser, submitForm } from "../../../app/_server";
import { entry } from "./examples";

const count = Number(process.argv[2]);
for (let variant = 1; variant <= count; variant++) {
  const note = `wait ${50 + ((variant * 37) % 150)}`;
  const result = await submitForm(localUser, entry(variant, { note }), { idempotencyKey: `document-${variant}` });
  if (!result.ok) throw new Error(result.problem.detail);
}
process.exit(0);
