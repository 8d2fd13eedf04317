import Link from "next/link";
import { DOCS_GROUPS } from "./_parts/pages";

/** The first page of the reference: what there is, and where. */
export default function DocsStart() {
  return (
    <>
      <h1 className="text-2xl tracking-tight md:text-3xl">Reference</h1>
      <p className="mt-3 max-w-2xl text-lg text-quiet">
        A netlist holds the circuit, what is swept, and what must hold. These pages say all that may stand in
        it, which equations are solved, and how each number is made.
      </p>
      {DOCS_GROUPS.map(({ title, pages }) => (
        <section key={title} aria-labelledby={title} className="mt-8 border-t pt-4">
          <h2 id={title} className="caption">
            {title}
          </h2>
          <ul className="mt-3 grid gap-x-10 gap-y-5 sm:grid-cols-2">
            {pages.map(({ href, label, about }) => (
              <li key={href}>
                <Link href={href} className="link inline-flex min-h-6 items-center font-semibold">
                  {label}
                </Link>
                <p className="mt-0.5 text-quiet text-sm">{about}</p>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </>
  );
}
