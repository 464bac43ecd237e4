// Said when there is no letter at an address.
import { Sheet } from './Sheet.tsx';

export function MissingPage() {
  return (
    <Sheet title="No such letter">
      <h1>No such letter</h1>
      <p>
        There is nothing at this address. <a href="/">All letters</a>
      </p>
    </Sheet>
  );
}
