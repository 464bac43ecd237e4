// What the rest of the server may use of the pages.
export { mountPages, type PagesOptions } from './mount-pages.ts';
export { createDrawnOnce, type DrawnOnce } from './page-cache.ts';
export { keepAnswer, sendKept, type KeptAnswer } from './kept-answer.ts';
