// One answer said back, with the way to change it.
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

type Props = { name: string; changeTo?: string; children: ReactNode };

/** A name of two capitals, as Gift Aid, keeps them. */
const insideSentence = (name: string): string =>
  /^\S+ [A-Z]/.test(name) ? name : name.charAt(0).toLowerCase() + name.slice(1);

export function AnswerRow({ name, changeTo, children }: Props) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{children}</dd>
      {changeTo ? (
        <dd className="ch">
          <Link to={changeTo}>
            Change<span className="visually-hidden"> {insideSentence(name)}</span>
          </Link>
        </dd>
      ) : null}
    </div>
  );
}
