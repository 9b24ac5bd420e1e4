import { describe, expect, test } from "vitest";
import { levels as allLevels, type levels } from "../../server/screening/cautions/catalogue.js";
import { failureFindings } from "../../server/screening/failureFindings.js";
import { type Document, documentOf, modelOf, stepOf } from "./realised.js";

type Text = Record<string, unknown>;

const names = ["batch-hydrolysis", "batch-ring-closure", "published-oncb", "semibatch-acylation"];

/** Findings of a case with other failures than its own. */
function findingsOf(
  name: string,
  failures: readonly Text[],
  change: (document: Document) => Document = (d) => d,
) {
  const document = change({ ...documentOf(name), failures });
  return failureFindings(stepOf(document), modelOf(document).failures);
}

const stops: Text = { name: "Coolant stops", at: "0 min", changes: [{ after: "0 min", coolantFlow: 0 }] };
const response = { detection: "5 min", decision: "10 min", action: "10 min" };
const unstirred: Text = {
  name: "Agitator stops",
  at: "1 h",
  changes: [{ after: "0 min", agitator: "off", heatTransfer: 0.2 }],
};
const quenchAt = (temperature: string): Text => ({
  name: "Quench",
  at: "0 min",
  changes: [
    { after: "0 min", coolantFlow: 0 },
    {
      after: "30 min",
      quench: { mass: "600 kg", heatCapacity: "2 kJ/(kg K)", density: "0.9 kg/L", temperature },
    },
  ],
});

const smaller = (document: Document): Document => ({
  ...document,
  vessel: { ...(document.vessel as Document), heatTransferArea: "0.3 m^2" },
});

/** Each caution by a failure that raises it and one that does not. */
const pairs: readonly {
  readonly code: keyof typeof levels;
  readonly from: string;
  readonly raised: Text;
  readonly not: Text;
  readonly change?: (document: Document) => Document;
}[] = [
  {
    code: "ACT_TOO_LATE",
    from: "batch-ring-closure",
    raised: { ...stops, response: { ...response, action: "1 h" } },
    not: { ...stops, response },
  },
  {
    code: "CANNOT_HOLD",
    from: "batch-ring-closure",
    raised: { ...stops, startTemperature: "140 degC" },
    not: stops,
  },
  { code: "MIXING_LOST", from: "semibatch-acylation", raised: unstirred, not: stops },
  {
    code: "FEED_RUNS_ON",
    from: "semibatch-acylation",
    raised: stops,
    not: { ...stops, changes: [{ after: "0 min", coolantFlow: 0, feed: "stop" }] },
  },
  {
    code: "BEYOND_MODEL",
    from: "batch-ring-closure",
    raised: stops,
    not: {
      ...stops,
      changes: [
        { after: "0 min", coolantFlow: 0 },
        { after: "5 min", coolantFlow: 1 },
      ],
    },
  },
  {
    code: "LATE_FAILURE",
    from: "semibatch-acylation",
    raised: { ...stops, at: "8 h" },
    not: { ...stops, at: "2.9 h" },
  },
  {
    code: "WARM_QUENCH",
    from: "batch-ring-closure",
    raised: quenchAt("105 degC"),
    not: quenchAt("90 degC"),
  },
];

describe("each caution on a failure is raised where it should be, and only there", () => {
  test.each(pairs)("$code", ({ code, from, raised, not }) => {
    const found = findingsOf(from, [not, raised]).cautions.filter((each) => each.code === code);
    expect(found).toHaveLength(1);
    expect(found[0].about).toMatch(/^\/failures\/1/);
    expect(found[0].level).toBe(allLevels[code]);
    expect(found[0].text).toContain(`“${raised.name}”`);
  });

  test("ACT_TOO_LATE, for a failure that is lost whatever is done", () => {
    const { failures, cautions } = findingsOf("batch-ring-closure", [stops], smaller);
    expect(failures?.[0]).toMatchObject({ verdict: "lost", timeToAct_s: 0 });
    expect(cautions.map((each) => each.code)).toEqual(
      expect.arrayContaining(["ACT_TOO_LATE", "CANNOT_HOLD"]),
    );
  });

  test("ACT_TOO_LATE says by how much", () => {
    const slow = { ...stops, response: { ...response, action: "1 h" } };
    const text = findingsOf("batch-ring-closure", [slow]).cautions.find(
      (each) => each.code === "ACT_TOO_LATE",
    )?.text;
    // 2,252 s are 37.5 min; 75 min are needed.
    expect(text).toContain("leaves 37.5 min to act");
    expect(text).toContain("take 75.0 min");
    expect(text).toContain("37.5 min too late");
  });
});

describe("the findings of the failures of a case", () => {
  test.each(names)("%s: every number is finite or null, and they stand in the order of the case", (name) => {
    const model = modelOf(documentOf(name));
    const { failures } = failureFindings(stepOf(documentOf(name)), model.failures);
    expect(failures?.map((each) => each.name)).toEqual(model.failures.map((each) => each.name));
    const numbers = JSON.stringify(failures, (_, value) =>
      typeof value === "number" && !Number.isFinite(value) ? "not finite" : value,
    );
    expect(numbers).not.toContain("not finite");
  });

  test("say which assumption on mixing is shown only where the agitator stops", () => {
    const { failures } = findingsOf("semibatch-acylation", [stops, unstirred]);
    expect(failures?.[0].mixingAssumed).toBeNull();
    expect(["mixed", "unmixed"]).toContain(failures?.[1].mixingAssumed);
  });

  test("have the moments of the feed, and none for a batch", () => {
    expect(findingsOf("semibatch-acylation", [stops]).failures?.[0].vulnerable).toHaveLength(21);
    expect(findingsOf("batch-ring-closure", [stops]).failures?.[0].vulnerable).toBeNull();
  });

  test("are null, with a caution, where no rate constant is known", () => {
    const document = documentOf("semibatch-acylation");
    const step = stepOf(document);
    const unknown = { ...step, reaction: { ...step.reaction, rate: null } };
    const { failures, cautions } = failureFindings(unknown, modelOf(document).failures);
    expect(failures).toBeNull();
    expect(cautions.map((each) => each.code)).toEqual(["NOT_ASSESSED"]);
  });

  test("warn where a measurement has accumulated more than the kinetics that they are run with", () => {
    const document = documentOf("semibatch-acylation");
    const step = stepOf(document);
    const { failures } = modelOf(document);
    const codesWith = (measuredExcess: number) =>
      failureFindings({ ...step, reaction: { ...step.reaction, measuredExcess } }, failures).cautions.map(
        (each) => each.code,
      );
    expect(codesWith(4)).toContain("MEASURED_ACCUMULATION");
    expect(codesWith(0)).not.toContain("MEASURED_ACCUMULATION");
  });

  test("of two failures at different temperatures start each at its own", () => {
    const cold = { ...stops, name: "Cold", startTemperature: "60 degC" };
    const { failures } = findingsOf("batch-ring-closure", [stops, cold]);
    expect(failures?.[0].trace[0].temperature_K).toBeCloseTo(358.15, 9);
    expect(failures?.[1].trace[0].temperature_K).toBeCloseTo(333.15, 9);
  });
});
