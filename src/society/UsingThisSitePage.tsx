// How the site can be used, what was done so that everybody can, and how to tell us where it fails.
import { Contact } from './Contact.tsx';
import { useSociety } from './use-society.ts';

export function UsingThisSitePage() {
  const society = useSociety();
  if (!society) return null;
  return (
    <main id="main" className="prose">
      <h1>Using this site</h1>
      <p className="lead">
        These pages are meant for everybody: on a phone in the market square, by keyboard, with a screen
        reader, in large print.
      </p>
      <h2>What was done</h2>
      <ul>
        <li>Everything can be done with a keyboard alone, and you can see where you are.</li>
        <li>Text can be made four times as large, and nothing is lost or hidden behind anything else.</li>
        <li>The pages read, and the gift form works, without JavaScript.</li>
        <li>
          The drawing of the figure says in words what it shows. Each part of it can be reached, and each has
          an address of its own. The ruled list below it holds the same facts.
        </li>
        <li>No state is told by colour alone. Light and dark follow the setting of your device.</li>
        <li>Nothing moves if your device asks for less motion.</li>
        <li>Nothing runs out of time without a warning, and no picture puzzle is ever asked.</li>
        <li>When an answer needs putting right, we say what to do, and keep all the others.</li>
      </ul>
      <p>
        We work to the Web Content Accessibility Guidelines 2.2 at level AA, and every page is checked by
        machine each time the site is changed. A machine does not find everything.
      </p>
      <h2>Where it falls short</h2>
      <p>
        The levelling staff beside the figure hides some of its sums where they would stand too close to each
        other; a screen reader still reads all of them. The card payment page belongs to the card service and
        follows its own statement.
      </p>
      <h2>Tell us</h2>
      <p>
        If something here does not work for you, tell us, and say what you were trying to do. We answer within
        two weeks, and take your gift or your question by telephone or by post meanwhile.
      </p>
      <Contact society={society} />
    </main>
  );
}
