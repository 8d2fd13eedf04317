/** Ways to put the command line into a pipeline, for any program that runs shell commands. */
export const RECIPES: readonly {
  readonly id: string;
  readonly title: string;
  readonly says: string;
  readonly lines: string;
}[] = [
  {
    id: "recipe.gate",
    title: "Fail a change that breaks a requirement",
    says: "One command for a folder. It leaves with code 1 as soon as one requirement of one file breaks or has no data.",
    lines: `npx sweepwright run --quiet --junit report.xml netlists/*.swn`,
  },
  {
    id: "recipe.early",
    title: "Find mistakes before anything is solved",
    says: "Checking takes milliseconds a file, so it goes first. The second line keeps every file in its canonical form.",
    lines: `npx sweepwright check --annotations netlists/*.swn
npx sweepwright format --check netlists/*.swn`,
  },
  {
    id: "recipe.keep",
    title: "Keep the curves with the build",
    says: "Each line of the file is the run document of one netlist, the same for any number of threads, so two builds can be compared by their bytes.",
    lines: `npx sweepwright run --json --output runs.jsonl --timeout 600 netlists/*.swn`,
  },
  {
    id: "recipe.codes",
    title: "Tell a broken design from a broken machine",
    says: "Codes from 2 on say that nothing was judged.",
    lines: `code=0
npx sweepwright run --quiet --junit report.xml netlists/*.swn || code=$?
case $code in
  0) echo "every requirement holds" ;;
  1) echo "a requirement broke or has no data; see report.xml" ;;
  3) echo "a netlist has an error" ;;
  *) echo "nothing was judged (code $code); try again" ;;
esac
exit $code`,
  },
  {
    id: "recipe.stages",
    title: "As stages of a pipeline",
    says: "In the form that many pipelines read; rename the keys to those of yours.",
    lines: `stages:
  - name: check
    run:
      - npx sweepwright format --check netlists/*.swn
      - npx sweepwright check --annotations netlists/*.swn
  - name: prove
    run:
      - npx sweepwright run --quiet --junit report.xml --timeout 1800 netlists/*.swn
    keep:
      - report.xml`,
  },
];

/** What one finds on stdout, as it stands there. */
export const REPORTS: readonly {
  readonly id: string;
  readonly title: string;
  readonly says: string;
  readonly lines: string;
}[] = [
  {
    id: "report.annotations",
    title: "Annotations",
    says: "One line for each diagnostic and each requirement that does not hold, with its place. Lines and columns count from 1.",
    lines: `head.swn:4:25: error UNI2: \`10k\` has a prefix but no unit; write \`10 kΩ\`.`,
  },
  {
    id: "report.junit",
    title: "JUnit XML",
    says: "A suite for each file and a case for each requirement. A requirement that does not hold is a failure, a netlist with errors an error. It holds no times, so the same files give the same bytes.",
    lines: `<testsuite name="Absorbance head" file="head.swn" tests="3" failures="0" errors="0">
    <testcase name="scale" classname="head.swn"/>`,
  },
  {
    id: "report.json",
    title: "JSON lines",
    says: "One object a file, each on a line of its own: of `run` the run document, of `check` the diagnostics.",
    lines: `{"format":"sweepwright-run/1","title":"Absorbance head","verdict":"holds","axes":[…],…}`,
  },
];
