// The treasurer's reason for settling a payment that does not agree or a refused event; the row then leaves.
import { useState, type SubmitEvent } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { settlePaymentSchema } from '#shared/giving/desk-schemas.ts';
import type { OwedAction } from '#shared/today/today-schemas.ts';
import { useSettlePayment } from '#src/giving/desk/gift-desk-queries.ts';
import { TextField } from '#src/ui/TextField.tsx';
import { TODAY } from './today-queries.ts';

type Props = { action: Extract<OwedAction, { kind: 'settle' }> };

export function SettlePayment({ action: { paymentKind, paymentId } }: Props) {
  const queryClient = useQueryClient();
  const settle = useSettlePayment();
  const [reason, setReason] = useState('');
  const [fault, setFault] = useState<string>();
  const submit = (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const parsed = settlePaymentSchema.safeParse({ reason });
    setFault(parsed.error?.issues[0]?.message);
    if (!parsed.success) return;
    settle.mutate(
      { paymentKind, paymentId, ...parsed.data },
      { onSettled: () => void queryClient.invalidateQueries({ queryKey: TODAY }) },
    );
  };
  return (
    <form noValidate onSubmit={submit}>
      <TextField
        name={`reason-${paymentId}`}
        label="How it was put right"
        hint="Kept with your name. For example: given back in the card service’s own pages."
        fault={fault}
        autoComplete="off"
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <button type="submit" className="act" disabled={settle.isPending}>
        Settled
      </button>
      {settle.isError && (
        <span className="overdue small" role="alert">
          Not kept. {settle.error.message}
        </span>
      )}
    </form>
  );
}
