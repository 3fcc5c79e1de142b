/**
 * What may be logged of an error. A failed query carries its bound parameters in its message and keeps them beside it,
 * so of such an error only the database's own code is told.
 */
export function errorReport(error: unknown): { error: string; stack?: string } {
  if (!(error instanceof Error)) return { error: typeof error };
  const stack = stackOf(error);
  const told = isOfQuery(error) ? databaseCode(error) : error.message;
  return { error: told, ...(stack !== "" && { stack }) };
}

/** Drizzle's error has `query` and `params`, the driver's `sql`; neither has a name of its own. */
const isOfQuery = (error: Error): boolean => "sql" in error || ("query" in error && "params" in error);

function databaseCode(error: Error): string {
  for (let each: unknown = error; each instanceof Error; each = each.cause)
    if ("code" in each && typeof each.code === "string") return each.code;
  return "query failed";
}

/** The places alone: a stack begins with the message. */
function stackOf({ stack = "", message }: Error): string {
  const start = message === "" ? 0 : stack.indexOf(message) + message.length;
  return stack
    .slice(start)
    .split("\n")
    .filter((line) => line.startsWith("    at "))
    .join("\n");
}
