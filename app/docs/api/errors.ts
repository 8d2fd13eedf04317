import type { ErrorCode } from "@/lib/errors";

/** When each error is given, in one line. */
export const ERROR_MEANINGS: Readonly<Record<ErrorCode, string>> = {
  invalid: "the request cannot be understood, or the netlist has errors",
  "signed out": "there is no session, or it has ended",
  "not allowed": "your role may not do this, or the request comes from another site",
  "not found": "there is no such thing, or it is not yours to see",
  "not acceptable": "the answer has none of the forms that Accept names",
  conflict: "it has changed meanwhile, or is in a state in which this cannot be done",
  "precondition failed": "the entity tag in If-Match is no longer the newest",
  "precondition required": "say upon which revision it was written, in base or in If-Match",
  "key reused": "this Idempotency-Key was used for another request",
  "too large": "the request or the netlist is larger than can be taken",
  "too many": "too many requests; Retry-After says when to come again",
  unavailable: "the database does not answer; come again in a few seconds",
};
