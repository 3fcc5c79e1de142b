import { useEffect, useState } from "react";

export type LoadedImage =
  { kind: "none" } | { kind: "loading" } | { kind: "shown"; image: HTMLImageElement } | { kind: "failed" };

/** The image at `url`; the former one is gone as soon as the address changes. */
export function useImage(url: string | null): LoadedImage {
  const [loaded, setLoaded] = useState<{ url: string | null; state: LoadedImage }>({
    url: null,
    state: { kind: "none" },
  });
  useEffect(() => {
    if (url === null) return;
    let current = true;
    const image = new Image();
    image.decoding = "async";
    image.onload = () => current && setLoaded({ url, state: { kind: "shown", image } });
    image.onerror = () => current && setLoaded({ url, state: { kind: "failed" } });
    image.src = url;
    return () => {
      current = false;
    };
  }, [url]);
  if (url === null) return { kind: "none" };
  return loaded.url === url ? loaded.state : { kind: "loading" };
}
