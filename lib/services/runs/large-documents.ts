import { AppError } from "@/lib/errors";
import { count } from "@/lib/language/limits";
import { Gate } from "../gate";

/** Numbers of a document from which on it is large: it then takes tens of megabytes of this process while somebody reads it. */
export const LARGE = 1_000_000;
/** Numbers that one document may hold; browsers read no longer text of JSON than these make. */
export const MOST_NUMBERS = 16_000_000;

const SENTENCE = "Other large runs are being read at the moment. Try again in a few seconds.";
const ofOnePerson = new Gate(2, SENTENCE);
const ofAll = new Gate(4, SENTENCE);

/**
 * Makes room for a document of so many numbers; the function it gives says that the document is no longer needed. Throws
 * "too large" beyond what a document may hold, and "too many" while too many large ones are under way.
 */
export function roomFor(userId: string, numbers: number): () => void {
  refuseTooLarge(numbers);
  if (numbers < LARGE) return () => undefined;
  const leave = ofOnePerson.enter(userId);
  try {
    const leaveAll = ofAll.enter("");
    return () => {
      leave();
      leaveAll();
    };
  } catch (error) {
    leave();
    throw error;
  }
}

/** Throws "too large" for more numbers than a document may hold. */
export function refuseTooLarge(numbers: number): void {
  if (numbers <= MOST_NUMBERS) return;
  throw new AppError(
    "too large",
    `This run has ${count(numbers)} numbers, and ${count(MOST_NUMBERS)} can be read at once. Sweep fewer points or show fewer traces.`,
  );
}
