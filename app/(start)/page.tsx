import Link from "next/link";
import { ButtonLink } from "@/app/_components/ui/button";
import { EnterLink } from "@/app/_components/ui/enter-link";
import { Wordmark } from "@/app/_components/ui/logo";
import { NetlistText } from "@/app/_components/ui/netlist-text";
import { currentUser } from "@/lib/auth/actor";
import { LANDING_NETLIST } from "./landing-curve";
import { LandingPlot } from "./landing-plot";

const POINTS = [
  {
    title: "One file holds the design",
    text: "The circuit, what to sweep and which traces to keep stand in one netlist with units on every value. A mistake is named at its place while you type, with the way to mend it.",
  },
  {
    title: "Every point is accounted for",
    text: "A queued worker solves each point of the sweep and keeps its outcome, its iterations and its residual. A point that would not settle is shown with the nets farthest from settled, and never drawn over.",
  },
  {
    title: "The curve stays with the revision",
    text: "Saving makes a revision that never changes. Runs, traces and the state of each point are stored with it, and a link shows a colleague the same curve.",
  },
] as const;

export default async function StartPage() {
  const user = await currentUser();
  return (
    <div className="mx-auto max-w-7xl px-4 md:px-6">
      <header className="flex min-h-14 flex-wrap items-center justify-between gap-x-3">
        <Wordmark />
        <div className="flex items-center gap-3 sm:gap-4">
          <Link href="/docs" className="inline-flex min-h-8 items-center text-quiet text-sm hover:text-ink">
            Reference
          </Link>
          <EnterLink isSignedIn={user !== null} tone="primary" />
        </div>
      </header>
      <main>
        <div className="border-t py-10 md:py-16">
          <h1 className="max-w-3xl text-3xl leading-tight tracking-tight md:text-5xl">
            Show that the logarithm holds, before the board is made
          </h1>
          <p className="mt-5 max-w-2xl text-lg text-quiet">
            Sweepwright solves log-domain circuits, such as log and antilog converters, ratio heads,
            multipliers and root extractors, over decades of signal and over temperature. The team sees one
            curve, one revision and one account of every point.
          </p>
          <p className="mt-6 flex flex-wrap gap-3">
            <ButtonLink href="/docs/tour">Take the five-minute tour</ButtonLink>
            <ButtonLink href="/docs/examples" tone="quiet">
              See the examples
            </ButtonLink>
          </p>
        </div>
        <div className="grid gap-x-10 gap-y-8 border-t py-8 lg:grid-cols-[minmax(0,5fr)_minmax(0,7fr)]">
          <section aria-labelledby="netlist" className="min-w-0">
            <h2 id="netlist" className="caption">
              Netlist
            </h2>
            <NetlistText text={LANDING_NETLIST} />
          </section>
          <section aria-labelledby="curve" className="min-w-0">
            <h2 id="curve" className="caption mb-4">
              Curve <span className="ml-1 font-normal">three temperatures over six decades</span>
            </h2>
            <LandingPlot />
          </section>
        </div>
        <ul className="grid gap-8 border-t py-8 md:grid-cols-3">
          {POINTS.map(({ title, text }) => (
            <li key={title}>
              <h2 className="text-base">{title}</h2>
              <p className="mt-1 text-quiet text-sm">{text}</p>
            </li>
          ))}
        </ul>
      </main>
      <footer className="border-t py-6 text-quiet text-xs">
        Results come from models, which leave things out; they are no proof of safety.
      </footer>
    </div>
  );
}
