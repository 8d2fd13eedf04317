import type { z } from "zod";
import {
  createInput,
  listInput as netlistsInput,
  restoreInput,
  revisionsInput,
  saveInput,
} from "@/lib/services/netlists/schemas";
import { listInput as runsInput, startInput } from "@/lib/services/runs/schemas";
import { newsInput } from "@/lib/services/workspaces/list-news";

/** A route of the API as the page describes it; what it takes follows from the schema that reads it. */
export interface RouteText {
  readonly method: "GET" | "POST";
  readonly path: string;
  readonly says: string;
  /** What stands in the query of a GET, in the body of a POST. `netlistId` and `number` of the address are left out. */
  readonly takes: z.ZodObject | null;
  /** The body or query names the workspace by its slug as well. */
  readonly hasWorkspace?: boolean;
  /** A parameter that a header may give instead. */
  readonly optional?: readonly string[];
  readonly answers: readonly (readonly [status: string, what: string])[];
}

const MADE_ONCE = "With an `Idempotency-Key` it is made once: the same request again gets the same answer.";

export const ROUTE_GROUPS: readonly {
  readonly id: string;
  readonly title: string;
  readonly routes: readonly RouteText[];
}[] = [
  {
    id: "netlists",
    title: "Netlists",
    routes: [
      {
        method: "GET",
        path: "/api/v1/netlists",
        says: "The netlists of a workspace, a page at a time.",
        takes: netlistsInput,
        hasWorkspace: true,
        answers: [["200", "`{ rows, total }`"]],
      },
      {
        method: "POST",
        path: "/api/v1/netlists",
        says: `Makes a netlist with its first revision. ${MADE_ONCE}`,
        takes: createInput,
        hasWorkspace: true,
        answers: [["201", "`{ id }`, and its address in `Location`"]],
      },
      {
        method: "GET",
        path: "/api/v1/netlists/{id}",
        says: "A netlist with the text of its newest revision, whose entity tag the answer carries.",
        takes: null,
        answers: [
          ["200", "`{ id, number, title, text, revision, hash, owner, updatedAt, lastRun }`, `ETag`"],
        ],
      },
      {
        method: "POST",
        path: "/api/v1/netlists/{id}/archive",
        says: "Takes a netlist out of the lists. Everything of it is kept.",
        takes: null,
        answers: [["200", "`{ archived: true }`"]],
      },
      {
        method: "POST",
        path: "/api/v1/netlists/{id}/bring-back",
        says: "Puts an archived netlist into the lists again.",
        takes: null,
        answers: [["200", "`{ archived: false }`"]],
      },
    ],
  },
  {
    id: "revisions",
    title: "Revisions",
    routes: [
      {
        method: "GET",
        path: "/api/v1/netlists/{id}/revisions",
        says: "The revisions of a netlist, the newest first.",
        takes: revisionsInput,
        answers: [["200", "`{ rows, total }`"]],
      },
      {
        method: "POST",
        path: "/api/v1/netlists/{id}/revisions",
        says: `Saves a text. What it was written upon stands in \`base\` or, as an entity tag, in \`If-Match\`; if that is no longer the newest, nothing is saved. ${MADE_ONCE}`,
        takes: saveInput,
        optional: ["base"],
        answers: [
          ["201", "`{ revision, hash, changed: true }`, `ETag`"],
          ["200", "the same with `changed: false`: the newest revision has that canonical text already"],
          ["409, 412", "another revision is newer: by `base`, by `If-Match`"],
          ["428", "neither was given"],
        ],
      },
      {
        method: "GET",
        path: "/api/v1/netlists/{id}/revisions/{n}",
        says: "One revision with its text. It never changes.",
        takes: null,
        answers: [
          ["200", "the revision, `ETag`"],
          ["304", "to `If-None-Match` with that tag"],
        ],
      },
      {
        method: "POST",
        path: "/api/v1/netlists/{id}/revisions/{n}/restore",
        says: "Saves the text of an earlier revision as the newest, in the manner of saving.",
        takes: restoreInput,
        optional: ["base"],
        answers: [["201, 200, 409, 412, 428", "as in saving"]],
      },
      {
        method: "POST",
        path: "/api/v1/netlists/{id}/revisions/{n}/duplicate",
        says: `Makes a new netlist with the text of the revision. ${MADE_ONCE}`,
        takes: null,
        answers: [["201", "`{ id }`, and its address in `Location`"]],
      },
    ],
  },
  {
    id: "runs",
    title: "Runs",
    routes: [
      {
        method: "GET",
        path: "/api/v1/runs",
        says: "The runs of a workspace, the newest first.",
        takes: runsInput,
        hasWorkspace: true,
        answers: [["200", "`{ rows, total }`"]],
      },
      {
        method: "POST",
        path: "/api/v1/runs",
        says: "Queues a run of a netlist. With a text that differs from the revision `base`, that text is saved first.",
        takes: startInput,
        answers: [
          ["201", "`{ id, number }`, and its address in `Location`"],
          ["400", "with `diagnostics` where the text has errors"],
        ],
      },
      {
        method: "GET",
        path: "/api/v1/runs/{id}",
        says: "A run in the form that `Accept` names: the run document, comma-separated values, or binary columns.",
        takes: null,
        answers: [
          ["200", "`application/json`, `text/csv` or `application/octet-stream`; `ETag`"],
          ["304", "to `If-None-Match` with that tag"],
          ["406", "for any other form"],
        ],
      },
      {
        method: "GET",
        path: "/api/v1/runs/{id}/columns",
        says: "The binary columns at an address of their own, for readers that cannot choose a header.",
        takes: null,
        answers: [
          ["200", "`application/octet-stream`, `ETag`"],
          ["304", "to `If-None-Match` with that tag"],
        ],
      },
      {
        method: "GET",
        path: "/api/v1/runs/{id}/summary",
        says: "The state of a run, its plan and its judgement, without results.",
        takes: null,
        answers: [["200", "`{ status, plan, points, pointsDone, pointsFailed, judgement, … }`"]],
      },
      {
        method: "GET",
        path: "/api/v1/runs/{id}/events",
        says: "Progress as server-sent events, until the run has ended. `id` is the sequence, `data` the state after the event. A reader that comes again names the last one in `Last-Event-ID`, or in `?after=`.",
        takes: null,
        answers: [
          ["200", "`text/event-stream`"],
          ["204", "the last event is known already: stay away"],
          ["429", "to a person who follows thirty runs at once"],
        ],
      },
      {
        method: "GET",
        path: "/api/v1/runs/{id}/points/{k}",
        says: "All that is kept about one point: its place, outcome, rung, iterations, residual, bound, every unknown and trace. Points count from 0, the first sweep fastest, then the others, then the draws.",
        takes: null,
        answers: [["200", "one point; its figures are null while it is not solved yet"]],
      },
      {
        method: "POST",
        path: "/api/v1/runs/{id}/cancel",
        says: "Stops a run. What was solved stays.",
        takes: null,
        answers: [
          ["200", "the state of the run"],
          ["409", "it has ended already"],
        ],
      },
    ],
  },
  {
    id: "news",
    title: "News",
    routes: [
      {
        method: "GET",
        path: "/api/v1/news",
        says: "What has happened since an earlier answer that concerns who asks: runs that have ended, and, of one netlist, revisions that others have saved.",
        takes: newsInput,
        hasWorkspace: true,
        answers: [["200", "`{ now, runs, revisions }`; `now` is what to ask after next time"]],
      },
    ],
  },
];

/** What stands in the address of a route, and not in its query or body. */
export const IN_ADDRESS: readonly string[] = ["netlistId", "number"];

/** What each parameter means. */
export const PARAMETERS: Readonly<Record<string, string>> = {
  workspace: "the workspace, by its slug",
  query: "words that all have to occur",
  which: "what the netlists are to be",
  sort: "what the rows are ordered by",
  direction: "which way",
  page: "the page of the list, from 1",
  size: "rows of a page",
  title: "the title; by default that of the text",
  text: "the text of the netlist",
  message: "what was changed, for the history",
  base: "the number of the revision it was written upon",
  netlistId: "the netlist, by its id",
  revision: "of that netlist, the revision",
  status: "the state of the run",
  after: "the time after which it happened",
};

/** The address of a route within the page. */
export function addressOf({ method, path }: Pick<RouteText, "method" | "path">): string {
  return `${method}.${path.slice("/api/v1/".length).replaceAll("/", ".").replace(/[{}]/g, "")}`;
}
