import { afterAll, describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { directScreener, type ScreeningOrder, threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { demoDocument } from "./testApp.js";

const threaded = threadedScreener({ worker: built("server/web/screeningWorker.ts") });
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

  test("those who ask for the same case at once wait for one screening, and it ends with the last of them", async () => {
    const same = order("acylation", "full", "Shared");
    const [first, second] = [new AbortController(), new AbortController()];
    const answers = [first, second].map(({ signal }) => threaded.screen(same, signal));
    const [early, late] = answers.map((answer) => answer.then(String, (error: Error) => error.name));
    expect(threaded.load()).toEqual({ running: 1, waiting: 0 });
    first.abort();
    expect(await early).toBe("AbortError");
    expect(threaded.standing(same.digest)).not.toBeNull();
    second.abort();
    expect(await late).toBe("AbortError");
    expect(threaded.standing(same.digest)).toBeNull();
  });

  test("more work than can wait is refused with the status that says so", async () => {
    const controllers = Array.from({ length: 80 }, () => new AbortController());
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
    expect(threaded.load().waiting).toBe(0);
  });
});
