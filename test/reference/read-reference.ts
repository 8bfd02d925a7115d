import { readFileSync } from 'node:fs';

/** One of the JSON files beside the script that made it. The caller states its layout. */
export function readReference(name: string): unknown {
  return JSON.parse(readFileSync(new URL(name, import.meta.url), 'utf8')) as unknown;
}
