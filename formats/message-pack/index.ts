export { decodeMessagePack, MessagePackError, type Unpacked } from './decode.ts';
export { encodeMessagePack, type Packable } from './encode.ts';
