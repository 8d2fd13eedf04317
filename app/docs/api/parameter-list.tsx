import { z } from "zod";
import { ReferenceTable } from "../_parts/reference-table";
import { IN_ADDRESS, PARAMETERS, type RouteText } from "./routes";

/** What a schema says of one of its fields, of that part of JSON Schema which ours come to. */
interface Field {
  readonly type?: string;
  readonly enum?: readonly string[];
  readonly format?: string;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly maxLength?: number;
  readonly default?: unknown;
}

/** The fields that a route takes, by name, from the schema that reads them. */
export function fieldsOf({ takes, path, hasWorkspace = false, optional = [] }: RouteText) {
  if (takes === null) return [];
  const { properties = {}, required = [] } = z.toJSONSchema(takes, { io: "input", unrepresentable: "any" });
  const own = Object.entries(properties as Record<string, Field>)
    .filter(([name]) => !(path.includes("{") && IN_ADDRESS.includes(name)))
    .map(([name, field]) => ({
      name,
      field,
      isRequired: required.includes(name) && !optional.includes(name),
    }));
  const workspace = { name: "workspace", field: { type: "string" } as Field, isRequired: true };
  return hasWorkspace ? [workspace, ...own] : own;
}

function kindOf({ type, enum: choices, format, minimum, maximum, maxLength }: Field): string {
  if (choices !== undefined) return choices.join(", ");
  if (format === "uuid") return "id";
  if (format === "date-time") return "time, ISO 8601";
  if (type === "integer" || type === "number") {
    const most = maximum === undefined || maximum >= 1_000_000 ? null : maximum;
    return most === null ? `whole number from ${minimum ?? 0}` : `whole number, ${minimum} to ${most}`;
  }
  return maxLength === undefined ? "text" : `text, ${maxLength} characters at most`;
}

const MUST = "must be given";

/** What a route takes, with the limits of the schema that reads it. */
export function ParameterList({ route, id }: { readonly route: RouteText; readonly id: string }) {
  const fields = fieldsOf(route);
  if (fields.length === 0) return null;
  return (
    <ReferenceTable
      caption={`What ${route.method} ${route.path} takes`}
      heads={[route.method === "GET" ? "Query" : "Body", "Meaning", "Is", "If left out"]}
      rows={fields.map(({ name, field, isRequired }) => ({
        id: `${id}.${name}`,
        cells: [
          <code key="name">{name}</code>,
          PARAMETERS[name] ?? "",
          kindOf(field),
          isRequired ? MUST : leftOut(field),
        ],
      }))}
      spare={[2, 3]}
      small={({ cells }) => (
        <>
          {cells[2]}; {cells[3] === MUST ? MUST : <>left out: {cells[3]}</>}
        </>
      )}
    />
  );
}

function leftOut({ default: otherwise }: Field): string {
  return otherwise === undefined ? "none" : otherwise === "" ? "empty" : String(otherwise);
}
