import type { Metadata } from "next";
import { STATUS } from "@/lib/api/problem";
import { DocsPage, Entry, Points, Section, Text } from "../_parts/docs-page";
import { FilterField } from "../_parts/filter-field";
import { Prose } from "../_parts/prose";
import { ReferenceTable } from "../_parts/reference-table";
import { ERROR_MEANINGS } from "./errors";
import { Columns, RunDocument } from "./forms";
import { ParameterList } from "./parameter-list";
import { addressOf, ROUTE_GROUPS, type RouteText } from "./routes";

export const metadata: Metadata = { title: "API" };

const OUTLINE = [
  { id: "manner", label: "Manner" },
  ...ROUTE_GROUPS.map(({ id, title }) => ({ id, label: title })),
  { id: "run-document", label: "The run document" },
  { id: "columns", label: "Binary columns" },
  { id: "errors", label: "Errors" },
];

const MANNER = [
  "Everything is under `/api/v1`. Bodies are JSON in UTF-8, answers too unless said otherwise.",
  "A request acts for the person whose session it carries and may do what their role in the workspace may do. What belongs to another workspace answers 404.",
  "A request that changes something has to come from the pages of the service itself (`Origin`).",
  "All quantities are in coherent SI units: V, A, Ω, K. Times are ISO 8601 in UTC.",
  "Lists come in pages: `page` counts from 1, `total` says how many rows there are.",
  "An `Idempotency-Key` is any text of your own for one request. The same key with another request is refused (422).",
] as const;

export default function ApiPage() {
  return (
    <DocsPage
      title="API"
      lead="What the pages show and do, over HTTP: netlists and their revisions, runs and their figures."
      outline={OUTLINE}
    >
      <FilterField what="runs, ETag, columns" />
      <Section id="manner" title="Manner">
        <Points items={MANNER.map((text) => <Prose key={text}>{text}</Prose>)} />
      </Section>
      {ROUTE_GROUPS.map(({ id, title, routes }) => (
        <Section key={id} id={id} title={title}>
          {routes.map((route) => (
            <Route key={route.method + route.path} route={route} />
          ))}
        </Section>
      ))}
      <RunDocument />
      <Columns />
      <Section id="errors" title="Errors">
        <Text>
          <Prose>
            {
              "Problem details (RFC 9457), `application/problem+json`: `detail` is a sentence that says what is wrong and how to mend it, `code` one of these words. What else is known stands beside them, such as `diagnostics` or `latest`."
            }
          </Prose>
        </Text>
        <ReferenceTable
          caption="Errors"
          heads={["Code", "Means", "Status"]}
          rows={Object.entries(STATUS).map(([code, status]) => ({
            id: `error.${code.replaceAll(" ", "-")}`,
            cells: [code, ERROR_MEANINGS[code as keyof typeof STATUS], String(status)],
          }))}
        />
      </Section>
    </DocsPage>
  );
}

function Route({ route }: { readonly route: RouteText }) {
  const id = addressOf(route);
  return (
    <Entry id={id} title={<code className="break-all">{`${route.method} ${route.path}`}</code>}>
      <Text>
        <Prose>{route.says}</Prose>
      </Text>
      <ParameterList route={route} id={id} />
      <ul className="mt-2 text-sm">
        {route.answers.map(([status, what]) => (
          <li key={status} className="flex gap-3">
            <span className="figures shrink-0 text-quiet">{status}</span>
            <span className="min-w-0 break-words">
              <Prose>{what}</Prose>
            </span>
          </li>
        ))}
      </ul>
    </Entry>
  );
}
