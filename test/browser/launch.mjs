// The browser of the checks: Debian's Chromium unless CHROMIUM names another, unseen and asking nothing of the network.

import { chromium } from "playwright-core";

export const launchBrowser = () =>
  chromium.launch({
    executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium",
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
