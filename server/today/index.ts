// The desk's first page, mounted by the application.
export { listOwed } from './owed-service.ts';
export { createTodayRouter } from './today-routes.ts';
