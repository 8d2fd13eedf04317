import { Complaint } from "./complaint";

/** Parts of the checks that can be run alone. */
export const PARTS = ["format", "types", "unit", "integration", "e2e"] as const;
export type Part = (typeof PARTS)[number];

/** Which parts to run, by the words after `npm test --`: all of them, or those after --only. */
export function chosenParts(words: readonly string[]): readonly Part[] {
  if (words.length === 0) return PARTS;
  const usage = `Say: npm test -- --only ${PARTS.join("|")}  (several with commas between).`;
  const [option, list] = words[0]!.startsWith("--only=")
    ? ["--only", words[0]!.slice("--only=".length)]
    : words;
  const parts = (list ?? "").split(",");
  if (option !== "--only" || words.length > 2 || !parts.every(isPart)) {
    throw new Complaint(`"${words.join(" ")}" is not understood. ${usage}`);
  }
  return PARTS.filter((part) => parts.includes(part));
}

function isPart(word: string): word is Part {
  return (PARTS as readonly string[]).includes(word);
}
