/** What stands wherever a plan is shown or handed over. */
export const CAUTION =
  'A plan is a proposal. Rest, qualification, safeguarding and working time are governed by local rules, ' +
  'which this tool does not know; whoever signs the plan answers for it.';
