/** Whether `error` is the database's refusal of a second row with the same `uniqueKey` (its name in the schema). */
export function isDuplicateEntry(error: unknown, uniqueKey: string): boolean {
  for (let each = error; each instanceof Error; each = each.cause)
    if ("code" in each && each.code === "ER_DUP_ENTRY") return each.message.includes(uniqueKey);
  return false;
}
