/** One browser's cookies over several origins, and requests that do not follow redirects by themselves. */
export class Visitor {
  /** host (with port) → path → name → value; sign-in providers keep cookies for one path. */
  private readonly cookies = new Map<string, { name: string; value: string; path: string }[]>();

  /**
   * @param reroute origins that are answered at another address, such as an app under test whose APP_ORIGIN
   *   nobody listens on
   * @param address what a proxy before the app would say that this browser's address is
   */
  constructor(
    private readonly reroute: ReadonlyMap<string, string> = new Map(),
    private readonly address?: string,
  ) {}

  async request(address: string | URL, init: RequestInit = {}): Promise<Response> {
    const url = new URL(address);
    const headers = new Headers(init.headers);
    const cookie = this.cookieHeader(url);
    if (cookie) headers.set("cookie", cookie);
    const unsafe = !["GET", "HEAD", undefined].includes(init.method?.toUpperCase());
    if (unsafe && !headers.has("origin")) headers.set("origin", url.origin);
    if (this.address && this.reroute.has(url.origin)) headers.set("x-forwarded-for", this.address);
    const target = (this.reroute.get(url.origin) ?? url.origin) + url.pathname + url.search;
    const response = await fetch(target, { ...init, headers, redirect: "manual" });
    this.keepCookies(url, response);
    return response;
  }

  /** Follows redirects as a browser does, to the first answer that is none. */
  async visit(address: string | URL, init: RequestInit = {}): Promise<{ url: URL; response: Response }> {
    let url = new URL(address);
    let response = await this.request(url, init);
    for (let hops = 0; response.headers.has("location"); hops += 1) {
      if (hops > 20) throw new Error(`More than 20 redirects, the last to ${url}.`);
      url = new URL(response.headers.get("location") ?? "", url);
      await response.body?.cancel();
      response = await this.request(url);
    }
    return { url, response };
  }

  private cookieHeader(url: URL): string {
    return (this.cookies.get(url.host) ?? [])
      .filter(({ path }) => url.pathname === path || url.pathname.startsWith(path.replace(/\/?$/, "/")))
      .map(({ name, value }) => `${name}=${value}`)
      .join("; ");
  }

  private keepCookies(url: URL, response: Response): void {
    for (const line of response.headers.getSetCookie()) {
      const [pair = "", ...attributes] = line.split(";").map((part) => part.trim());
      const name = pair.slice(0, pair.indexOf("="));
      const value = pair.slice(pair.indexOf("=") + 1);
      const attribute = (wanted: string) =>
        attributes.find((one) => one.toLowerCase().startsWith(`${wanted}=`))?.slice(wanted.length + 1);
      const path = attribute("path") ?? "/";
      const maxAge = attribute("max-age");
      const expires = attribute("expires");
      const over =
        (maxAge && Number(maxAge) <= 0) || (!maxAge && expires && Date.parse(expires) <= Date.now());
      const others = (this.cookies.get(url.host) ?? []).filter(
        (one) => one.name !== name || one.path !== path,
      );
      this.cookies.set(url.host, over ? others : [...others, { name, value, path }]);
    }
  }
}
