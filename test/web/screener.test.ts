import { afterAll, describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { directScreener, type ScreeningOrder, threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { demoDocument } from "./testApp.js";

const threaded = threadedScreener(built("server/web/screeningWorker.ts"));
afterAll(() => threaded.close());

function order(name: string, depth: "quick" | "full", title?: string): ScreeningOrder {
  const document = demoDocument(name);
  const read = readCase(title === undefined ? document : { ...document, title });
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  return { model: read.model, digest: read.digest, depth };
}

describe("screening in threads", () => {
  test("gives what screening in this thread gives", async () => {
    const [there, here] = await Promise.all([
      threaded.screen(order("hydrolysis", "full")),
      directScreener().screen(order("hydrolysis", "full")),
    ]);
    expect(there).toEqual(here);
  });

  test("the full findings of a case are kept, and only they", async () => {
    const quick = order("hydrolysis", "quick", "Kept");
    await threaded.screen(quick);
    expect(threaded.known(quick.digest)).toBeNull();
    const full = await threaded.screen({ ...quick, depth: "full" });
    expect(threaded.known(quick.digest)).toBe(full);
  });

  test("work that nobody waits for is given up, and the next is done", async () => {
    const controller = new AbortController();
    const long = threaded.screen(order("acylation", "full", "Abandoned"), controller.signal);
    setTimeout(() => controller.abort(), 100);
    await expect(long).rejects.toThrow(/abort/i);
    expect(await threaded.screen(order("hydrolysis", "full", "Next"))).toMatchObject({ failures: [{}] });
  });

  test("more work than can wait is refused with the status that says so", async () => {
    const controllers = Array.from({ length: 60 }, () => new AbortController());
    const outcomes = controllers.map(({ signal }, index) =>
      threaded.screen(order("acylation", "full", `Burst ${index}`), signal).then(
        () => "done",
        (error: Error & { status?: number }) => error.status ?? "given up",
      ),
    );
    setTimeout(() => {
      for (const controller of controllers) controller.abort();
    }, 200);
    expect(await Promise.all(outcomes)).toContain(503);
  });
});
