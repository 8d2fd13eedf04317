import { readFileSync } from "node:fs";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { DOCUMENT_FIELDS } from "@/app/docs/api/forms";
import ApiPage from "@/app/docs/api/page";
import { fieldsOf } from "@/app/docs/api/parameter-list";
import { addressOf, PARAMETERS, ROUTE_GROUPS } from "@/app/docs/api/routes";
import { STATUS } from "@/lib/api/problem";
import { PATHS } from "@/tests/architecture/sources";

const page = renderToStaticMarkup(<ApiPage />);
const routes = ROUTE_GROUPS.flatMap((group) => group.routes);

describe("the page of the API", () => {
  test("has every method of every route, and none that there is not", () => {
    const served = PATHS.filter((path) => /^app\/api\/v1\/.*route\.ts$/.test(path)).flatMap((path) => {
      const address = path.slice("app".length, -"/route.ts".length).replace(/\[(\w+)\]/g, "{$1}");
      const methods = readFileSync(path, "utf8").matchAll(
        /export (?:const|async function|function) (GET|POST|PUT|PATCH|DELETE)\b/g,
      );
      return [...methods].map(([, method]) => `${method} ${address}`);
    });
    expect(served.length).toBeGreaterThan(15);
    expect(routes.map(({ method, path }) => `${method} ${path}`).sort()).toEqual(served.sort());
    expect(routes.map(addressOf).filter((id) => !page.includes(` id="${id}"`))).toEqual([]);
  });

  test("says what each parameter means, and of none that no route takes", () => {
    const taken = new Set(routes.flatMap((route) => fieldsOf(route).map(({ name }) => name)));
    expect(Object.keys(PARAMETERS).sort()).toEqual([...taken].sort());
  });

  test("takes the limits of parameters from what reads them", () => {
    const list = routes.find(({ method, path }) => method === "GET" && path === "/api/v1/netlists")!;
    const size = fieldsOf(list).find(({ name }) => name === "size")!;
    expect(size).toMatchObject({ isRequired: false, field: { minimum: 1, maximum: 100, default: 25 } });
  });

  test("has every error with its status", () => {
    const missing = Object.keys(STATUS).filter(
      (code) => !page.includes(` id="error.${code.replaceAll(" ", "-")}"`),
    );
    expect(missing).toEqual([]);
  });

  test("names an address once, and leads nowhere that is not there", () => {
    const ids = [...page.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
    expect(ids.length).toBe(new Set(ids).size);
    const links = [...page.matchAll(/href="#([^"]*)"/g)].map(([, id]) => id);
    expect(links.filter((id) => !ids.includes(id))).toEqual([]);
  });

  test("has the fields of the run document, as its type has them", () => {
    const source = readFileSync("lib/analyses/result.ts", "utf8");
    const shape = /export interface RunDocument \{([\s\S]*?)\n\}/.exec(source)![1]!;
    const fields = [...shape.matchAll(/^ {2}readonly (\w+)\??:/gm)].map(([, name]) => name);
    expect(fields.length).toBeGreaterThan(8);
    expect(DOCUMENT_FIELDS.map(([name]) => name).sort()).toEqual(fields.sort());
  });
});
