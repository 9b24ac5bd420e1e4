import request from "supertest";
import { describe, expect, test } from "vitest";
import { blankCase, editForm } from "../../server/case/form.js";
import { readCase } from "../../server/case/read.js";
import { failureLines } from "../../server/web/failuresView.js";
import { inventedWhole } from "../charts/inventedWhole.js";
import { filled } from "./filled.js";
import { demoDocument, testApp } from "./testApp.js";

const keys = [
  "coolant-stops",
  "coolant-warm",
  "agitator-stops",
  "feed-runs-on",
  "started-cold",
  "late-restart",
  "half-transfer",
  "quench",
];

function failuresOf(document: unknown): Record<string, unknown>[] {
  return (document as { failures?: Record<string, unknown>[] }).failures ?? [];
}

/** Keys of the starting points that the page of a case offers. */
function offered(text: string): string[] {
  return [...text.matchAll(/value="add-failure:([a-z-]+)"/g)].map(([, key]) => key ?? "");
}

describe("failures to begin with", () => {
  test("all eight are offered where there is a feed, the one about the feed left out of a batch", async () => {
    const { app } = testApp();
    expect(offered((await request(app).get("/demos/acylation")).text)).toEqual(keys);
    expect(offered((await request(app).get("/demos/ring-closure")).text)).toEqual(
      keys.filter((key) => key !== "feed-runs-on"),
    );
    expect(offered((await request(app).get("/cases/new")).text)).toHaveLength(7);
  });

  test.each(["acylation", "hydrolysis"])(
    "each is added to %s as a timeline that can be run and edited",
    async (name) => {
      const { app } = testApp();
      const document = demoDocument(name);
      const before = failuresOf(document).length;
      for (const key of offered((await request(app).get(`/demos/${name}`)).text)) {
        const added = editForm(document, `add-failure:${key}`);
        const failures = failuresOf(added);
        expect(failures).toHaveLength(before + 1);
        expect(failures.slice(0, before)).toEqual(failuresOf(document));
        const read = readCase(added);
        expect(read.ok ? [] : read.faults, key).toEqual([]);
        const { text } = await request(app)
          .post("/cases/new")
          .send(filled(document, { do: `add-failure:${key}` }))
          .expect(200);
        expect(text).toContain(`name="/failures/${before}/name" value="${String(failures.at(-1)?.name)}"`);
      }
      if (name === "hydrolysis")
        expect(JSON.stringify(editForm(document, "add-failure:coolant-stops"))).not.toContain('"feed"');
    },
  );

  test("temperatures and masses come from the case", () => {
    const started = failuresOf(editForm(demoDocument("acylation"), "add-failure:started-cold")).at(-1);
    const { reaction } = demoDocument("acylation") as { reaction: { temperature: string } };
    expect(Number.parseFloat(String(started?.startTemperature))).toBe(
      Number.parseFloat(reaction.temperature) - 15,
    );
  });

  test("a second one of the same kind has a name of its own, and what was typed is kept", async () => {
    const twice = editForm(editForm(blankCase(), "add-failure:quench"), "add-failure:quench");
    const names = failuresOf(twice).map(({ name }) => name);
    expect(new Set(names).size).toBe(2);
    const { text } = await request(testApp().app)
      .post("/cases/new")
      .send(filled(twice, { do: "add-failure:quench", "/mixture/mass": "12 firkin" }))
      .expect(200);
    expect(text).toContain('value="12 firkin"');
    expect(text).toContain(`value="${names[0]}, 3"`);
  });

  test("an unknown one, one for another operation and one too many add nothing", () => {
    const document = demoDocument("hydrolysis");
    for (const key of ["feed-runs-on", "", "__proto__", "constructor"]) {
      expect(editForm(document, `add-failure:${key}`)).toEqual(document);
    }
    const [failure] = failuresOf(document);
    const full = { ...document, failures: Array.from({ length: 20 }, () => failure) };
    expect(editForm(full, "add-failure:quench")).toEqual(full);
  });
});

describe("all failures of a case", () => {
  test("stand in one table on the page, the most pressing first, each with its sentence", async () => {
    const { text } = await request(testApp().app)
      .post("/cases/new")
      .send(filled(demoDocument("acylation"), { do: "screen" }))
      .expect(200);
    const table = /<table class="told-table">[\s\S]*?<\/table>/.exec(text)?.[0] ?? "";
    const fates = [...table.matchAll(/fate-(lost|act|holds)/g)].map(([, fate]) => fate ?? "");
    expect(fates).toHaveLength(failuresOf(demoDocument("acylation")).length);
    const order = ["lost", "act", "holds"];
    expect(fates.map((fate) => order.indexOf(fate))).toEqual(
      fates.map((fate) => order.indexOf(fate)).toSorted((a, b) => a - b),
    );
    expect(table).toMatch(/Put right what failed|Putting right what failed|nobody has to act/);
    expect(text.match(/id="figure-failures"/g)).toHaveLength(1);
  });

  test("are numbered as their figure numbers them", () => {
    const lines = failureLines(inventedWhole);
    expect(lines.map(({ number }) => number)).toEqual(lines.map((_, at) => at + 1));
    expect(lines.length).toBeGreaterThan(1);
  });
});
