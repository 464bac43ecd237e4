// A first start that was cut off leaves half a town behind. It is told by two marks, and begun again from nothing.
import { prepareSql, runSql } from './database.mjs';

/** The generator writes the one before its first row and the other after its last: a society's own data bear neither. */
const IS_HALF_FILLED = `
  select exists (select from settings where key = 'demonstration-begun')
    and not exists (select from settings where key = 'demonstration-seeded');
`;

export async function isHalfFilled(connection, name) {
  return (await runSql({ ...connection, database: name }, IS_HALF_FILLED)) === 't';
}

/** The application may not take back what stands in the books, so the whole database goes and comes anew. */
export async function beginAgain(connection, roles) {
  if (!(await isHalfFilled(connection, roles.name))) return;
  await runSql(connection, `drop database ${roles.name} with (force);`);
  await runSql(connection, prepareSql(roles));
}
