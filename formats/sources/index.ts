export { type ByteSink, type ByteSource, blobSource, bytesSource } from './byte-source.ts';
export { urlSource } from './url-source.ts';
export { WindowSource } from './window-source.ts';
