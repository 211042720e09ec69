import { health } from "../../../_server";
import { json, route } from "../../../_server/http";

export const GET = route(async () => json(await health()));
