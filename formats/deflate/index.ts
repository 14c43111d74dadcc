export { inflate } from './inflate.ts';
export { PlaneDeflater } from './plane-deflater.ts';
