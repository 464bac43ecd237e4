// For a number at which no gift stands.
import { Link } from 'react-router-dom';
import { GiftRefusal } from './GiftRefusal.tsx';

const AllGifts = (
  <>
    <Link className="act" to="/desk/gifts">
      All gifts
    </Link>{' '}
  </>
);

export const NoSuchGift = ({ number }: { number: string }) => (
  <GiftRefusal title={`There is no gift ${number}`} wayBack={AllGifts}>
    <p>The number may have been typed with a slip.</p>
  </GiftRefusal>
);
