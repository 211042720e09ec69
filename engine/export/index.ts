/** Forms in other languages, one file each. */
import type { Exporter } from "./exporter";
import { json } from "./json";
import { latex } from "./latex";

export type { Exporter, ExportOptions } from "./exporter";

export const exporters: readonly Exporter[] = [latex, json];
