import { checkFormat, checkTypes, runTests } from "./phases";
import { closingLine, sum, type Tally } from "./tally";

const tallies: Tally[] = [];

async function phase(name: string, work: () => Promise<Tally>): Promise<void> {
  console.log(`\n── ${name}`);
  const began = Date.now();
  const tally = await work();
  tallies.push(tally);
  console.log(`── ${name}: ${closingLine(tally)}, ${((Date.now() - began) / 1000).toFixed(1)} s`);
}

await phase("format and lint", checkFormat);
await phase("types", checkTypes);
await phase("unit tests", () => runTests("unit"));

const all = sum(tallies);
console.log(`\n${closingLine(all)}`);
process.exitCode = all.failed === 0 ? 0 : 1;
