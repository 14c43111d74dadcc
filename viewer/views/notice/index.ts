export { NoticeElement } from './notice.ts';
