/** What no output may say (the rules of indications): a verdict or a date that overall values do not give. */
export const NEVER =
  /remaining life|\bhealth(?:y\b| score)|safe to run|no action required|continue to monitor|per cent probab|% probab|will fail|failure date|\bimproved\b(?! by less)/i;
