// Number, expiry and security code, each with its fault beside it.

export type CardFaults = Partial<Record<'number' | 'expiry' | 'code', string>>;
type FieldProps = {
  id: keyof CardFaults;
  label: string;
  hint: string;
  value?: string;
  fault: string | undefined;
};

function Field({ id, label, hint, value, fault }: FieldProps) {
  return (
    <div className="field">
      <label className="head" htmlFor={id}>
        {label}
      </label>
      <span className="hint" id={`${id}-hint`}>
        {hint}
      </span>
      {fault && (
        <span className="fault" id={`${id}-fault`}>
          {fault}
        </span>
      )}
      {/* No filling in by the browser: it would offer the payer's real card. */}
      <input
        id={id}
        name={id}
        inputMode="numeric"
        autoComplete="off"
        defaultValue={value}
        aria-invalid={fault ? true : undefined}
        aria-describedby={fault ? `${id}-hint ${id}-fault` : `${id}-hint`}
      />
    </div>
  );
}

type Props = { expiry: string; code: string; faults: CardFaults };

export function CardFields({ expiry, code, faults }: Props) {
  return (
    <>
      <Field
        id="number"
        label="Card number"
        hint="Leave it empty to use the card chosen above."
        fault={faults.number}
      />
      <div className="pair">
        <Field id="expiry" label="Expiry" hint="Month / year" value={expiry} fault={faults.expiry} />
        <Field id="code" label="Security code" hint="Any three digits" value={code} fault={faults.code} />
      </div>
    </>
  );
}
