// The people at the demonstration's desk, all invented. Their passwords and secrets are printed at every start.
import type { Role } from '#shared/roles.ts';

export type DemonstrationPerson = {
  name: string;
  email: string;
  password: string;
  roles: readonly Role[];
  isTrustee: boolean;
  /** Base32 secret of the one-time codes, for roles that need a second factor. */
  totpSecret?: string;
};

export const DEMONSTRATION_PEOPLE: readonly DemonstrationPerson[] = [
  {
    name: 'Ruth Askerne',
    email: 'ruth.askerne@brackenhythe.example',
    password: 'river-lamp-at-dusk',
    roles: ['chair'],
    isTrustee: true,
    totpSecret: 'JBSWY3DPEHPK3PXPJBSWY3DPEHPK3PXP',
  },
  {
    name: 'Edwin Marl',
    email: 'edwin.marl@brackenhythe.example',
    password: 'every-peg-holds-fast',
    roles: ['treasurer'],
    isTrustee: true,
    totpSecret: 'KRSXG5CTMVRXEZLUKRSXG5CTMVRXEZLU',
  },
  {
    name: 'Nell Tolley',
    email: 'nell.tolley@brackenhythe.example',
    password: 'letters-on-the-staithe',
    roles: ['secretary'],
    isTrustee: false,
  },
  {
    name: 'Osric Wray',
    email: 'osric.wray@brackenhythe.example',
    password: 'green-oak-and-mallet',
    roles: ['site'],
    isTrustee: false,
  },
  {
    name: 'Hester Quillan',
    email: 'hester.quillan@brackenhythe.example',
    password: 'ticks-in-the-margin',
    roles: ['examiner'],
    isTrustee: false,
  },
];
