// What other rooms may use of the books and funds.
export { accountBalance, addFund, getFund, listPostings, type Fund, type PostedLine } from './books-store.ts';
export { keepCheckRun, runChecks, type CheckResult } from './checks.ts';
export { postCardFee, postGiftReceived, type FundShare } from './posting.ts';
