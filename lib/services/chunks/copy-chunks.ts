import { escapeLiteral } from "pg";
import { to } from "pg-copy-streams";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { shard } from "@/db/schema/shard";
import { CHUNK_POINTS } from "./codec";

/** Some of a column: its values from the flat point `at` on, as the table keeps them. */
export interface FoundChunk {
  readonly name: string;
  readonly at: number;
  readonly data: Uint8Array;
}

/** Bytes of the head of PostgreSQL's binary copy format: its mark, its flags and the length of what may follow them. */
const HEAD = 19;

/**
 * Columns of a run by PostgreSQL's binary copy: a question answers `bytea` as text of twice its length, which takes five times as
 * long for a million values. Each chunk is handed on as it arrives, column after column, all of one moment; it is valid during
 * that call only. `names` are those of columns, `runId` that of a run, neither from outside.
 */
export async function copyChunks(
  runId: string,
  names: readonly string[],
  take: (found: FoundChunk) => void,
): Promise<void> {
  const client = await database().$client.connect();
  let broken: Error | undefined;
  try {
    let rest: Buffer = Buffer.alloc(0);
    let begun = false;
    for await (const piece of client.query(to(statement(runId, names))) as AsyncIterable<Buffer>) {
      rest = rest.length === 0 ? piece : Buffer.concat([rest, piece]);
      let at = begun ? 0 : HEAD;
      if (rest.length < at) continue;
      begun = true;
      for (;;) {
        const end = rowEnd(rest, at);
        if (end === null) break;
        take(rowAt(rest, at));
        at = end;
      }
      rest = rest.subarray(at);
    }
  } catch (error) {
    broken = error instanceof Error ? error : new Error(String(error));
    throw error;
  } finally {
    // A connection that broke in the middle of a copy is not used again.
    client.release(broken);
  }
}

function statement(runId: string, names: readonly string[]): string {
  const [c, s] = [chunk, shard];
  const quoted = names.map(escapeLiteral).join(", ");
  return `COPY (
    SELECT c.${c.column.name}, s.${s.from.name}, c.${c.index.name}, c.${c.data.name}
    FROM chunk c JOIN shard s ON s.${s.runId.name} = c.${c.runId.name} AND s.${s.index.name} = c.${c.shardIndex.name}
    WHERE c.${c.runId.name} = ${escapeLiteral(runId)} AND c.${c.column.name} IN (${quoted})
    ORDER BY c.${c.column.name}
  ) TO STDOUT (FORMAT binary)`;
}

/** Where the row that begins at `at` ends; null where it is not whole yet, and for the trailer, which has −1 fields. */
function rowEnd(bytes: Buffer, at: number): number | null {
  if (at + 2 > bytes.length) return null;
  let end = at + 2;
  const fields = bytes.readInt16BE(at);
  if (fields < 0) return null;
  for (let field = 0; field < fields; field++) {
    if (end + 4 > bytes.length) return null;
    end += 4 + Math.max(0, bytes.readInt32BE(end));
  }
  return end <= bytes.length ? end : null;
}

/** The row of four fields that begins at `at`: text, two integers of 32 bits, bytes. */
function rowAt(bytes: Buffer, at: number): FoundChunk {
  const fields: Buffer[] = [];
  let from = at + 2;
  for (let field = 0; field < 4; field++) {
    const length = bytes.readInt32BE(from);
    fields.push(bytes.subarray(from + 4, from + 4 + length));
    from += 4 + length;
  }
  const [name, first, index, data] = fields as [Buffer, Buffer, Buffer, Buffer];
  return {
    name: name.toString("utf8"),
    at: first.readInt32BE(0) + index.readInt32BE(0) * CHUNK_POINTS,
    data,
  };
}
