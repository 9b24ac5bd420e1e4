import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { notice } from "../../server/screening/notice.js";
import { testApp } from "./testApp.js";

let server: Server;
let origin = "";
let text = "";

beforeAll(async () => {
  await new Promise<void>((ready) => {
    server = testApp().app.listen(0, "127.0.0.1", () => ready());
  });
  origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  text = await (await fetch(`${origin}/interface`)).text();
});

afterAll(() => server.close());

const characters: Readonly<Record<string, string>> = {
  "&#34;": '"',
  "&#39;": "'",
  "&lt;": "<",
  "&gt;": ">",
  "&amp;": "&",
};

/** What stands in the boxes of that class, as a reader copies it. */
function boxes(name: "command" | "answer"): readonly string[] {
  const found = [
    ...text.matchAll(new RegExp(`<pre class="${name}"[^>]*><code>([\\s\\S]*?)</code></pre>`, "g")),
  ];
  return found.map(([, code = ""]) =>
    code.replace(/&(?:#34|#39|lt|gt|amp);/g, (each) => characters[each] ?? each),
  );
}

/** Runs the commands as a shell with curl would: options, quotes, and one folder of files. */
async function run(commands: string): Promise<readonly Response[]> {
  const files = new Map<string, string>();
  const answers: Response[] = [];
  for (const command of commands.split("\n")) {
    const words = [...command.matchAll(/'([^']*)'|"([^"]*)"|(\S+)/g)].map(([, a, b, c]) => a ?? b ?? c ?? "");
    expect(words.shift()).toBe("curl");
    let [output, body, address]: (string | undefined)[] = [];
    const headers = new Headers();
    while (words.length > 0) {
      const word = words.shift() ?? "";
      if (word === "-s") continue;
      if (word === "-o") output = words.shift();
      else if (word === "-H") headers.set(...((words.shift() ?? "").split(": ") as [string, string]));
      else if (word === "--data-binary") body = files.get((words.shift() ?? "").replace("@", ""));
      else if (word === "--data") body = words.shift();
      else address = word;
    }
    const answer = await fetch(address ?? "", body === undefined ? {} : { method: "POST", headers, body });
    answers.push(answer.clone());
    if (output?.endsWith(".json")) files.set(output, await answer.text());
  }
  return answers;
}

describe("the example for programs", () => {
  test("runs as it stands and gets what the page shows of its answer", async () => {
    const [commands = ""] = boxes("command");
    const [, answer] = await run(commands);
    expect(answer?.status).toBe(200);
    const findings = (await answer?.json()) as Record<string, unknown>;
    const shown = JSON.parse(boxes("answer")[0] ?? "") as Record<string, unknown>;
    expect(Object.keys(shown)).toEqual(Object.keys(findings));
    for (const key of ["notice", "digest", "heat", "temperatures"]) expect(shown[key]).toEqual(findings[key]);
    expect(JSON.stringify(shown.cautions)).toContain(" more");
  });

  test("makes the sheet", async () => {
    const [example = "", sheet = ""] = boxes("command");
    const answers = await run(`${example.split("\n")[0]}\n${sheet}`);
    expect(answers[1]?.headers.get("content-type")).toBe("application/pdf");
  });

  test("is refused with the very problem that the page shows", async () => {
    const command = boxes("command").find((each) => each.includes("--data '")) ?? "";
    const [answer] = await run(command);
    expect(answer?.status).toBe(422);
    expect(answer?.headers.get("content-type")).toContain("application/problem+json");
    expect(await answer?.json()).toEqual(JSON.parse(boxes("answer")[1] ?? ""));
  });

  test("stands with the notice, and every part of the answer is explained", () => {
    expect(text).toContain(notice);
    for (const key of Object.keys(JSON.parse(boxes("answer")[0] ?? "{}"))) {
      expect(text).toContain(`<code>${key}</code>`);
    }
  });

  test("leads to the schema", async () => {
    expect(text).toContain('href="/api/case-schema"');
    const schema = await fetch(`${origin}/api/case-schema`);
    expect(schema.headers.get("content-type")).toContain("application/schema+json");
  });
});
