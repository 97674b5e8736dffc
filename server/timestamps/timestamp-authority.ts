import { readFile } from 'node:fs/promises';
import type { Config } from '../config.ts';
import { httpAuthority, type TimestampAuthority } from './authority.ts';
import { localAuthority } from './local-authority.ts';

/** The authority that the settings name, or the local one. @throws Error when the file of certificates cannot be read */
export async function timestampAuthority({ timestamps, dataDir }: Config): Promise<TimestampAuthority> {
  if (timestamps === null) return localAuthority(dataDir);
  return httpAuthority(timestamps.url, timestamps.caFile === null ? null : await readFile(timestamps.caFile, 'utf8'));
}
