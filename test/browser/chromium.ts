import { chromium } from "playwright-core";

/** Debian's package; .ci/set-up installs it. */
const EXECUTABLE = "/usr/bin/chromium";

const ARGUMENTS = [
  "--headless",
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

export type Browser = Awaited<ReturnType<typeof startChromium>>;
export type Page = Awaited<ReturnType<Browser["newPage"]>>;

/** With a fresh, empty profile that is removed when the browser closes. */
export function startChromium() {
  return chromium.launch({ executablePath: EXECUTABLE, args: ARGUMENTS, headless: true });
}
