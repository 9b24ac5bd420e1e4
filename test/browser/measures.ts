import { describe, expect, test } from "vitest";
import { settled, type Visit } from "./visit.js";

const comparison = "/compare?first=demos/ring-closure&second=demos/acylation&parts=quick";
const paths = [
  "/",
  "/cases/new",
  "/demos/ring-closure",
  "/demos/acylation",
  "/demos/hydrolysis",
  "/glossary",
  "/checks",
  "/interface",
  "/register",
  "/verify",
  comparison,
];

/** Sizes that pages keep: of the window they fit in, and of what they send. */
export function measures(visit: Visit): void {
  describe("no page scrolls sideways", () => {
    test.each(paths.flatMap((path) => [360, 768, 1280].map((width) => [path, width] as const)))(
      "%s at %i px, everything unfolded",
      async (path, width) => {
        const page = await visit(path, { viewport: { width, height: 800 } });
        await settled(page);
        await page.evaluate(() => {
          for (const each of document.querySelectorAll("details")) each.open = true;
        });
        expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
        await page.context().close();
      },
    );
  });

  test.each(paths)("%s with its assets is below 150 kB on the wire, and all of it is ours", async (path) => {
    const page = await visit("about:blank");
    let bytes = 0;
    const foreign: string[] = [];
    const complaints: string[] = [];
    page.on("console", (message) => complaints.push(message.text()));
    page.on("pageerror", (error) => complaints.push(error.message));
    page.on("requestfinished", async (request) => {
      const sizes = await request.sizes();
      bytes += sizes.responseBodySize + sizes.responseHeadersSize;
    });
    page.on("request", (request) => {
      if (new URL(request.url()).hostname !== "127.0.0.1") foreign.push(request.url());
    });
    await page.goto(path, { waitUntil: "networkidle" });
    expect(bytes).toBeGreaterThan(10_000);
    expect(bytes).toBeLessThan(150_000);
    expect(foreign).toEqual([]);
    expect(complaints).toEqual([]);
    await page.context().close();
  });
}
