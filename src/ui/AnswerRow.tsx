// One answer said back, with the way to change it.
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

type Props = { name: string; changeTo?: string; children: ReactNode };

export function AnswerRow({ name, changeTo, children }: Props) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{children}</dd>
      {changeTo ? (
        <dd className="ch">
          <Link to={changeTo}>
            Change<span className="visually-hidden"> {name.charAt(0).toLowerCase() + name.slice(1)}</span>
          </Link>
        </dd>
      ) : null}
    </div>
  );
}
