export { decodeMessagePack, encodeMessagePack, type Packable, type Unpacked } from './message-pack.ts';
export { MessagePackError } from './message-pack-error.ts';
