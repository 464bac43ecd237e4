// For whoever may not read gifts: who may, and the way back.
import { GiftRefusal } from './GiftRefusal.tsx';

export const NotForYourRoles = () => (
  <GiftRefusal title="Not for your roles">
    <p>
      Gifts are read by the chair, the treasurer, the secretary and the examiner. The chair gives the roles.
    </p>
  </GiftRefusal>
);
