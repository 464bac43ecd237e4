// What other rooms may use of Gift Aid declarations.
export { findDeclaration, keepDeclaration, type KeptDeclaration } from './declarations-service.ts';
