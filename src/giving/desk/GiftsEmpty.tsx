// What an empty list says: what goes here, and the first step.
import { Link } from 'react-router-dom';

export function GiftsEmpty({ hasAnyGift }: { hasAnyGift: boolean }) {
  if (hasAnyGift)
    return (
      <div className="blank" data-result tabIndex={-1}>
        <p>No gift is like that. Ask for fewer things at once, or see them all.</p>
        <p className="acts">
          <Link className="act" to="/desk/gifts">
            Show every gift
          </Link>
        </p>
      </div>
    );
  return (
    <div className="blank" data-result tabIndex={-1}>
      <p>
        No gift has come yet. Every gift by card is written here by itself the moment it is paid, with its
        thanks and its place in the books.
      </p>
      <p className="acts">
        <a className="act first" href="/give">
          See the sheet that givers fill in
        </a>
      </p>
    </div>
  );
}
