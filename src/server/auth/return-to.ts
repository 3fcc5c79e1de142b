const defaultPath = "/desk";
const maxLength = 512;

/**
 * The path to go on to after signing in: one of this application's own pages, whatever the address asked for.
 * Anything that a browser could read as another origin, a scheme or an endpoint leads to the Desk.
 */
export function safeReturnTo(wanted: string | null | undefined): string {
  if (wanted === null || wanted === undefined || wanted.length > maxLength) return defaultPath;
  // Printable ASCII without a backslash: browsers drop tabs and line ends and read "\" as "/".
  if (!/^\/(?!\/)[!-[\]-~]*$/.test(wanted)) return defaultPath;
  const base = "http://own.example";
  if (!URL.canParse(wanted, base)) return defaultPath;
  const url = new URL(wanted, base);
  if (url.origin !== base) return defaultPath;
  // Dot segments are resolved here, so that "/.//elsewhere.example" shows itself.
  const path = url.pathname + url.search;
  const isPage = !path.startsWith("//") && !/^\/(api|sign-in)(\/|\?|$)/.test(path);
  return isPage ? path : defaultPath;
}
