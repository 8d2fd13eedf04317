import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { MessageText } from "@/app/_components/editor/message-text";
import { PlainLines } from "@/app/_components/editor/plain-lines";
import { wholeQuantities } from "../../_parts/whole-quantities";
import { exampleNamed, planInWords } from "../examples";
import { GROUPS } from "../groups";
import { ExampleSheet } from "./example-sheet";

interface Props {
  readonly params: Promise<{ readonly name: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const example = await exampleNamed((await params).name);
  return example === null ? {} : { title: example.title };
}

export default async function ExamplePage({ params }: Props) {
  const { name } = await params;
  const example = await exampleNamed(name);
  if (example === null) notFound();
  const group = GROUPS.find(({ names }) => names.includes(name));
  const order = GROUPS.flatMap(({ names }) => names);
  const place = order.indexOf(name);
  const [before, after] = await Promise.all(
    [order[place - 1], order[place + 1]].map((one) => (one === undefined ? null : exampleNamed(one))),
  );
  return (
    <>
      <ExampleSheet
        key={name}
        name={name}
        text={example.text}
        head={
          <div className="min-w-0 max-w-2xl grow basis-80">
            <p className="text-quiet text-sm">
              <Link href="/docs/examples" className="link inline-flex min-h-6 items-center">
                Examples
              </Link>
              <span aria-hidden="true"> / </span>
              {group?.title}
            </p>
            <h1 className="mt-1 text-2xl tracking-tight">{example.title}</h1>
            <p className="mt-2">
              <MessageText message={wholeQuantities(example.lesson)} />
            </p>
            <p className="mt-2 text-quiet text-sm">
              {planInWords(example)}. Runs in this page: change the text and it is solved anew. Northbench
              Instruments and its figures are invented.
            </p>
          </div>
        }
      >
        <PlainLines text={example.text} label="Netlist text" />
      </ExampleSheet>
      <nav
        aria-label="Other examples"
        className="mt-6 flex flex-wrap justify-between gap-x-8 gap-y-2 text-sm"
      >
        {before ? (
          <Link href={`/docs/examples/${before.name}`} className="link inline-flex min-h-6 items-center">
            Previous: {before.title}
          </Link>
        ) : (
          <span />
        )}
        {after && (
          <Link href={`/docs/examples/${after.name}`} className="link inline-flex min-h-6 items-center">
            Next: {after.title}
          </Link>
        )}
      </nav>
    </>
  );
}
