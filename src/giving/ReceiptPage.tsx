// A receipt as a page: it reads on a screen and prints on one sheet.
import { useLoaderData } from 'react-router-dom';
import type { Receipt } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { AnswerRow } from '#src/ui/AnswerRow.tsx';
import { useHydrated } from '#src/ui/use-hydrated.ts';
import type { ReceiptPageData } from './give-loaders.ts';
import { inSentence } from '#shared/campaign/name-rules.ts';
import { SharesList } from './SharesList.tsx';

function ReceiptAnswers({ receipt }: { receipt: Receipt }) {
  const { dedication, wallWords } = receipt;
  return (
    <dl className="answers">
      <AnswerRow name="Received from">{receipt.name}</AnswerRow>
      <AnswerRow name="On">{receipt.givenOn}</AnswerRow>
      <AnswerRow name="Sum">
        <b>{formatPence(receipt.sumPence)}</b>, by card
      </AnswerRow>
      <AnswerRow name="Towards">
        <SharesList shares={receipt.shares} splitNote={receipt.splitNote} />
      </AnswerRow>
      {dedication ? (
        <AnswerRow name={dedication.kind === 'memory' ? 'In memory of' : 'In honour of'}>
          {dedication.name}
        </AnswerRow>
      ) : null}
      {wallWords ? <AnswerRow name="On the wall">“{wallWords}”</AnswerRow> : null}
    </dl>
  );
}

function Declaration({ declaration }: { declaration: NonNullable<Receipt['declaration']> }) {
  return (
    <section className="row">
      <h2 className="h">Your Gift Aid declaration</h2>
      <div className="fields">
        <p className="declared">{declaration.wording}</p>
        <p className="sans small">
          Declared by {declaration.name}, {declaration.address}, on {declaration.givenOn}.
        </p>
      </div>
      <p className="note">
        Gift Aid adds {formatPence(declaration.giftAidPence)}. Please tell us if your name or home address
        changes, or if you no longer pay enough tax.
      </p>
    </section>
  );
}

export function ReceiptPage() {
  const { receipt, token } = useLoaderData<ReceiptPageData>();
  const canPrint = useHydrated();
  return (
    <main id="main" className="page receipt check">
      <h1>Receipt {receipt.number}</h1>
      <p className="lead">
        Dear {receipt.greeting}, thank you for your gift to {inSentence(receipt.campaignName)}.
      </p>
      <div className="buttons">
        <a className="button plain" href={`/receipts/${token}.pdf`}>
          Receipt as PDF
        </a>
        {canPrint ? (
          <button type="button" className="button plain" onClick={() => window.print()}>
            Print
          </button>
        ) : null}
      </div>
      <div className="sheet">
        <ReceiptAnswers receipt={receipt} />
        {receipt.declaration ? <Declaration declaration={receipt.declaration} /> : null}
        <section className="row">
          <h2 className="h">To change anything</h2>
          <div className="fields">
            <p>{receipt.contact}</p>
            <p>{receipt.complaints}</p>
          </div>
          <p className="note">
            {receipt.societyName}, {receipt.societyAddress}
            <br />
            {receipt.registrationStatement}
          </p>
        </section>
      </div>
    </main>
  );
}
