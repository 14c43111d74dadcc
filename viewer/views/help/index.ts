export { HelpElement } from './help.ts';
export { KEY_GROUPS, type KeyLine } from './keys.ts';
