import { outcomeInWords, reasonOf } from "@/lib/analyses/reasons";
import { OUTCOMES } from "@/lib/solver/outcome";
import { Points as List, Section, Text } from "../_parts/docs-page";
import { Formula } from "../_parts/math";
import { Prose } from "../_parts/prose";
import { ReferenceTable } from "../_parts/reference-table";

export const CONTRACT_SAMPLE = `title "A contract"
knob I_in = 1 µA
model junction : diode { Is = 1 fA ± 10 % }
ground -- I1 : current I_in -- anode -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
draws 40 seed 11
show out = anode.v
read slope = per_decade(out)
require slope within 59.16 mV ± 0.1 % as "slope"
require out <= 0.72 V as "never above 0.72 V"
require out within 0.532 V ± 2 mV at I_in = 1 µA in 50 % of draws as "level, in half of the draws"
require out rising as "rises"`;

/** What makes a requirement hold, break, or stay without data. */
export function Judging() {
  const verdicts: readonly (readonly [string, string])[] = [
    [
      "holds",
      "At every point of its windows, in every draw that has to, its margin is known and not below 0 (above 0 for `<`, `>`, `rising`, `falling`).",
    ],
    ["broken", "At one point that counts it is below, whatever is not known elsewhere."],
    [
      "no data",
      "Nothing breaks it, but a point that it needs is not solved, or a value in it does not exist, such as a level that is never reached. It counts as a failure.",
    ],
  ];
  return (
    <Section id="verdicts" title="Verdicts">
      <ReferenceTable
        caption="Verdicts"
        heads={["Verdict", "When"]}
        rows={verdicts.map(([name, when]) => ({
          id: `verdict.${name.replace(" ", "-")}`,
          cells: [name, <Prose key="when">{when}</Prose>],
        }))}
      />
      <Text>
        <Prose>
          {
            "The verdict of a run is `broken` if one of its requirements is, else `no data` if one is, else `holds`. A run without requirements reads `holds` where every point is solved, else `no data`. With `seek`, a requirement has to hold at every stable operating point that was found."
          }
        </Prose>
      </Text>
    </Section>
  );
}

/** Draws, yield and budget, with the formulas by which they are worked out. */
export function Statistics() {
  return (
    <>
      <Section id="draws" title="Draws and yield">
        <List
          items={[
            <Prose key="nominal">
              Draw 0 is the nominal design; random draws count from 1. A requirement without a share has to
              hold in all, the nominal one too.
            </Prose>,
            <Prose key="share">
              {
                "With `in P % of draws` it has to hold in that share of the random draws, rounded up. Its margin is that of the draw which decides the share."
              }
            </Prose>,
            <Prose key="yield">
              The yield is the share of random draws in which it holds. Beside it stands the interval in which
              the share of all designs lies with 95 % confidence.
            </Prose>,
          ]}
        />
        <Text>
          <Prose>{"With $k$ of $N$ draws holding, and $B_p$ the quantile of the beta distribution:"}</Prose>
        </Text>
        <Formula>{'"low" = B_{0.025} ( k , N − k + 1 ) , | "high" = B_{0.975} ( k + 1 , N − k )'}</Formula>
        <p className="mt-2 text-quiet text-sm">Source: Clopper and Pearson (Biometrika 26, 1934, 404).</p>
      </Section>
      <Section id="budget" title="Error budget">
        <Text>
          <Prose>
            {
              "To first order about the nominal design. $s_i$ is the slope of a reading by a value with a tolerance, from the solved circuit; $h_i$ is the half-width, and $σ_i = h_i / sqrt{3}$ for a uniform law, $h_i / N$ for a normal one of $N$ sigma."
            }
          </Prose>
        </Text>
        <Formula>
          {'"variance" = Σ_i ( s_i σ_i )^2 , | "share of" i = frac{( s_i σ_i )^2}{Σ_j ( s_j σ_j )^2}'}
        </Formula>
        <Formula>{'"worst case" = ± Σ_i ∣ s_i h_i ∣'}</Formula>
        <Text>
          The list begins with the part that costs the most. Values that track share one entry for what they
          have in common, called after their group.
        </Text>
      </Section>
    </>
  );
}

/** What becomes of a point, and what its proved bound says. */
export function Points() {
  return (
    <Section id="points" title="Solved and proved">
      <Text>
        A point is solved when, with every aid of the solver off, the currents at every net balance and the
        last step moves nothing any more. <Prose>{"At net $i$, with $F_i$ what is left over:"}</Prose>
      </Text>
      <Formula>{'∣ F_i ∣ ≤ 10^{−10} Σ "branch currents" + 10^{−18} A'}</Formula>
      <Text>
        Its proved bound is a distance in volts within which a true solution of the equations lies of every
        reported voltage. It follows from the Newton–Kantorovich theorem with all rounding counted in. A point
        without a bound is marked as unproved. The bound is about the equations, not about the parts on a
        board.
      </Text>
      <ReferenceTable
        caption="Outcomes of a point"
        heads={["Outcome", "Why"]}
        rows={OUTCOMES.map((outcome) => ({
          id: `outcome.${outcome.replaceAll(" ", "-")}`,
          cells: [outcomeInWords(outcome), reasonOf(outcome, []) ?? "It has a value in every trace."],
        }))}
      />
      <Text>A point that fails stays empty in every trace, and the rest of the sweep stands.</Text>
    </Section>
  );
}
