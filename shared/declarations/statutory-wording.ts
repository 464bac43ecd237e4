// The declaration's statutory words. The law's own terms stand here and nowhere else in the product.

/** Version 1, after the contents that the Donations to Charity by Individuals regulations ask for (SI 2016/1195). */
export const declarationWording = (societyName: string): string =>
  `Treat as Gift Aid donations this gift, any gift I made to the ${societyName} in the past four years, and any I make from now on. ` +
  'I pay UK Income Tax or Capital Gains Tax. I understand that if I pay less of those taxes in a tax year than all charities ' +
  'together claim as Gift Aid on my gifts in that year, I must pay the difference myself. This is my own money: it is not from ' +
  'a collection, a raffle or a company.';

/** Told beside every declaration, not part of what is declared. */
export const DECLARATION_NOTICE =
  'We claim 25p for every £1 you give. Tell us if you want to stop this, if your name or home address changes, or if you no longer pay enough tax.';
