import { readdirSync, readFileSync } from 'node:fs';
import { extname, join } from 'node:path';

/** A file of the viewer's page, in memory. */
export interface PageFile {
  readonly type: string;
  readonly bytes: Uint8Array;
}

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.txt': 'text/plain; charset=utf-8',
  '.md': 'text/plain; charset=utf-8',
};

/**
 * All files of the built page by their address relative to it; index.html also stands for the empty address.
 *
 * An address is looked up here and never made into a path, so that nothing beside these files can be asked for.
 */
export function readPage(folder: string): ReadonlyMap<string, PageFile> {
  const files = new Map<string, PageFile>();
  const walk = (inside: string): void => {
    for (const item of readdirSync(join(folder, inside), { withFileTypes: true })) {
      const address = inside ? `${inside}/${item.name}` : item.name;
      if (item.isDirectory()) walk(address);
      else {
        const type = TYPES[extname(item.name)] ?? 'application/octet-stream';
        files.set(address, { type, bytes: readFileSync(join(folder, address)) });
      }
    }
  };
  walk('');
  const page = files.get('index.html');
  if (page) files.set('', page);
  return files;
}
