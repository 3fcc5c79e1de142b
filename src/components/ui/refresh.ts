const everyMs = 4000;

/** Brings `[data-refresh]` up to date from the page itself until the server leaves the attribute out. */
async function refresh(place: HTMLElement): Promise<void> {
  const response = await fetch(location.href);
  if (!response.ok) return;
  const page = new DOMParser().parseFromString(await response.text(), "text/html");
  const fresh = page.getElementById(place.id);
  if (fresh === null) return;
  if (fresh.innerHTML !== place.innerHTML) place.replaceChildren(...fresh.childNodes);
  if (fresh.dataset["refresh"] === undefined) delete place.dataset["refresh"];
}

function watch(place: HTMLElement): void {
  setTimeout(() => {
    // A failed attempt is passed over: the page still shows what it knew, and the next attempt follows.
    void refresh(place)
      .catch(() => undefined)
      .then(() => {
        if (place.dataset["refresh"] !== undefined) watch(place);
      });
  }, everyMs);
}

for (const place of document.querySelectorAll<HTMLElement>("[data-refresh]")) watch(place);
