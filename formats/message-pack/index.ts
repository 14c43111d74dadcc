export {
  decodeMessagePack,
  encodeMessagePack,
  type Packable,
  type PackableOrUndefined,
  type Unpacked,
  withoutUndefined,
} from './message-pack.ts';
export { MessagePackError } from './message-pack-error.ts';
