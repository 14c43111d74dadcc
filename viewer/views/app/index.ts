export { followAddress } from './address-bar.ts';
export { AppElement } from './app.ts';
export { type KeyCommand, type KeyPress, keyCommand } from './key-commands.ts';
