// The answers of a sheet as they count: settled before they are asked or compared.
import { tidyPostcode, type GiveFormFilled } from '#shared/giving/give-schemas.ts';

/** Whether two sheets ask for the same gift by the same person. */
export const sameAnswers = (one: GiveFormFilled, other: GiveFormFilled): boolean => {
  const flat = (answers: GiveFormFilled) => JSON.stringify(Object.entries(answers).sort());
  return flat(one) === flat(other);
};

/** Settles what the giver means before the gift is asked for: names tidied, unused fields emptied. */
export function settleAnswers(answers: GiveFormFilled): GiveFormFilled {
  const noDedication = { dedicationName: '', contactName: '', contactEmail: '', contactSum: '' as const };
  return {
    ...answers,
    ...(answers.dedication === 'none' && noDedication),
    wallWords: answers.wall === 'wall' ? answers.wallWords : '',
    postcode: tidyPostcode(answers.postcode) ?? answers.postcode,
    greeting: answers.greeting || answers.name,
  };
}
