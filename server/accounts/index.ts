// What other rooms may use of sign-in, roles and the audit trail.
export { recordAudit, type Actor, type AuditLine } from './audit.ts';
export { createAccountRouter } from './account-routes.ts';
export { createAccount, refuseDemonstrationAccounts, type NewAccount } from './accounts-service.ts';
export { deskPerson, requireDesk, requireRole, type DeskPerson } from './require-desk.ts';
export { createSessionRouter } from './session-routes.ts';
