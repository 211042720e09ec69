import { entryJsonSchema } from "../../../../_server";
import { json, route } from "../../../../_server/http";

export const GET = route(async () => json(entryJsonSchema(), 200, { "content-type": "application/schema+json" }));
