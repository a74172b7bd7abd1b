/** Of the set of checks; stored with each evaluation, so that it can be reproduced. */
export const RULES_VERSION = "2";
