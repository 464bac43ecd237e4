// Where to write or telephone, as a paragraph of its own.
import type { Society } from '#shared/society/society-schemas.ts';

export function Contact({ society }: { society: Society }) {
  return (
    <p>
      {society.name}, {society.addressLine}
      <br />
      <a href={`mailto:${society.email}`}>{society.email}</a>, <span className="nowrap">{society.phone}</span>
    </p>
  );
}
