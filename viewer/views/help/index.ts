export { HelpElement } from './help.ts';
export { type KeyCommand, type KeyPress, keyCommand } from './key-commands.ts';
export { KEY_GROUPS, type KeyLine } from './keys.ts';
