import { listAmplitudes } from "../../../_server";
import { json, route } from "../../../_server/http";

export const GET = route(async (_request, principal) => json(await listAmplitudes(principal)));
