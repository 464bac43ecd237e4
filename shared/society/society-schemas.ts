// The society's own details, as printed at the foot of every page and on every receipt.
import { z } from 'zod';

export const societySchema = z.object({
  name: z.string(),
  addressLine: z.string(),
  phone: z.string(),
  email: z.string(),
  charityNumber: z.string(),
  registrationStatement: z.string(),
  complaints: z.string(),
});
export type Society = z.infer<typeof societySchema>;
