import { chromium, type Browser } from "playwright-core";
import { findProgram } from "../../scripts/services/programs";

/** Debian's Chromium. Its "unexpected operator" line is a harmless one of its start script. */
export function launchBrowser(): Promise<Browser> {
  const executablePath = findProgram("chromium");
  if (!executablePath) throw new Error("Chromium is not installed (Debian package chromium).");
  return chromium.launch({
    executablePath,
    headless: true,
    args: [
      "--no-sandbox",
      "--disable-gpu",
      "--disable-quic",
      "--no-first-run",
      "--disable-background-networking",
      "--disable-component-update",
      "--disable-sync",
    ],
  });
}
