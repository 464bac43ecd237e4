// Prints how to sign in to the demonstration, a line a person.
import { DEMONSTRATION_PEOPLE } from './demonstration-people.ts';

for (const person of DEMONSTRATION_PEOPLE) {
  const code = person.totpSecret ? ', then a one-time code' : '';
  console.log(`${person.roles.join(', ').padEnd(10)} ${person.email.padEnd(38)} ${person.password}${code}`);
}
