export { historyToJson, type JsonElement, type JsonHistory, type JsonTable, jsonText } from './json/index.ts';
export {
  ChunkEncoder,
  type EncodedChunk,
  EVENTS_PER_CHUNK,
  type EventSummaries,
  FileBatch,
  type FileHistory,
  type Loss,
  type OwnColumn,
  type OwnColumns,
  type Recovery,
  recover,
  ShowerFileReader,
  ShowerFileWriter,
  type UnknownFileKeys,
} from './shower-file/index.ts';
export { type ShowerFileCode, ShowerFileError } from './shower-file-error.ts';
export { type ByteSink, type ByteSource, blobSource, bytesSource, urlSource } from './sources/index.ts';
