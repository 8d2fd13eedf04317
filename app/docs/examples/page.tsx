import type { Metadata } from "next";
import Link from "next/link";
import { MessageText } from "@/app/_components/editor/message-text";
import { Sparkline } from "@/app/_components/ui/sparkline";
import { wholeQuantities } from "../_parts/whole-quantities";
import { type Example, exampleNamed, planInWords } from "./examples";
import { GROUPS } from "./groups";
import { sketchOf } from "./sketch";

export const metadata: Metadata = { title: "Examples" };

export default async function ExamplesPage() {
  const groups = await Promise.all(
    GROUPS.map(async (group) => {
      const found = await Promise.all(group.names.map(exampleNamed));
      return { ...group, examples: found.filter((one) => one !== null) };
    }),
  );
  return (
    <>
      <h1 className="text-2xl tracking-tight md:text-3xl">Examples</h1>
      <p className="mt-3 max-w-2xl text-lg text-quiet">
        Whole circuits of the trade with what must hold of them. Each opens as a sheet that runs in the page:
        change a value and the curve moves, without an account.
      </p>
      <p className="mt-2 max-w-2xl text-quiet text-sm">
        Northbench Instruments, its parts and its figures are invented.
      </p>
      {groups.map(({ title, about, examples }) => (
        <section key={title} aria-labelledby={title} className="mt-8 border-t pt-4">
          <h2 id={title} className="text-lg">
            {title}
          </h2>
          <p className="text-quiet text-sm">{about}</p>
          <ul className="mt-3 grid gap-x-10 xl:grid-cols-2">
            {examples.map((example) => (
              <ExampleRow key={example.name} example={example} />
            ))}
          </ul>
        </section>
      ))}
    </>
  );
}

function ExampleRow({ example }: { readonly example: Example }) {
  const sketch = sketchOf(example);
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-6 gap-y-1 border-t py-3">
      <div className="min-w-0">
        <Link
          href={`/docs/examples/${example.name}`}
          className="link inline-flex min-h-6 items-center font-semibold"
        >
          {example.title}
        </Link>
        <p className="mt-0.5 text-sm">
          <MessageText message={wholeQuantities(example.lesson)} />
        </p>
        <p className="mt-1 text-quiet text-xs">{planInWords(example)}</p>
      </div>
      <div className="hidden pt-1 sm:block">{sketch !== null && <Sparkline data={sketch} />}</div>
    </li>
  );
}
