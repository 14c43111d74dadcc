export { ChunkEncoder, type EncodedChunk } from './chunk-encoder.ts';
export type { EventSummaries } from './event-summaries.ts';
export { FileBatch, type FileHistory, type OwnColumn, type OwnColumns } from './file-batch.ts';
export { EVENTS_PER_CHUNK } from './layout.ts';
export { ShowerFileReader } from './reader.ts';
export { type Recovery, recover } from './recover.ts';
export type { Loss } from './salvage.ts';
export { ShowerFileWriter, type UnknownFileKeys } from './writer.ts';
