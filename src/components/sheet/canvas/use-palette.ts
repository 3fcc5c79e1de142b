import { useSyncExternalStore } from "react";

const names = [
  "paper",
  "raised",
  "ink",
  "muted",
  "rule",
  "rule-strong",
  "accent",
  "copper",
  "within",
  "undecided",
  "over",
] as const;

/** The theme's colours for the canvas, which reads no CSS of its own. */
export type Palette = Record<(typeof names)[number], string> & { dark: boolean };

const deviceIsDark = "(prefers-color-scheme: dark)";

function read(): Palette {
  const root = document.documentElement;
  const style = getComputedStyle(root);
  const colours = Object.fromEntries(
    names.map((name) => [name, style.getPropertyValue(`--color-${name}`).trim()]),
  );
  return { ...(colours as Record<(typeof names)[number], string>), dark: style.colorScheme.includes("dark") };
}

let palette: Palette | null = null;

function subscribe(listener: () => void): () => void {
  const changed = () => {
    palette = read();
    listener();
  };
  const observer = new MutationObserver(changed);
  observer.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  const device = matchMedia(deviceIsDark);
  device.addEventListener("change", changed);
  return () => {
    observer.disconnect();
    device.removeEventListener("change", changed);
  };
}

export const usePalette = (): Palette => useSyncExternalStore(subscribe, () => (palette ??= read()));
