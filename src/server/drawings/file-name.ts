const maxLength = 255;

/** The name of an uploaded file as shown to people: no folders, no control characters, never empty. */
export function uploadedFileName(header: string | null): string {
  let name = header ?? "";
  try {
    name = decodeURIComponent(name);
  } catch {
    // A name that is not percent-encoded is taken as it stands.
  }
  const last = name.split(/[/\\]/).at(-1) ?? "";
  const clean = last.replace(/[\p{Cc}\p{Cf}\p{Co}\p{Cs}]/gu, "").trim();
  return [...(clean || "drawing")].slice(0, maxLength).join("");
}
