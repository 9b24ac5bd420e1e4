import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, normalize, relative } from "node:path";
import { describe, expect, test } from "vitest";
import { projectRoot } from "../server/settings.js";

/** The program, floor under floor. Files that stand in server/ itself belong to the top. */
const floors: readonly (readonly string[])[] = [
  ["main.ts"],
  ["cli", "web"],
  ["settings.ts", "password.ts"],
  ["sheet", "records", "files"],
  ["charts", "case"],
  ["screening"],
  ["uncertainty"],
  ["failure", "window"],
  ["thermal"],
  ["kinetics"],
  ["numeric", "words"],
];
const core = ["screening", "uncertainty", "failure", "window", "thermal", "kinetics", "numeric", "words"];
/** Packages of plain arithmetic; a core without I/O needs no others. */
const corePackages = /^(d3-(array|format|scale|shape)|pure-rand)(\/|$)/;

interface Import {
  readonly from: string;
  readonly to: string;
}

const server = join(projectRoot, "server");

function sources(folder: string): readonly string[] {
  return readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((path) => path.endsWith(".ts"))
    .map((path) => join(folder, path));
}

/** Source text without comments, which may name what the code must not. */
function codeOf(path: string): string {
  return readFileSync(path, "utf8")
    .replace(/\/\*[\s\S]*?\*\//g, "")
    .replace(/^\s*\/\/.*$/gm, "");
}

function importsOf(path: string): readonly string[] {
  const named = codeOf(path).matchAll(/(?:\bfrom|\bimport|\bimport\(|\bnew URL\()\s*"([^"]+)"/g);
  return [...named].flatMap((match) => (match[1] === undefined ? [] : [match[1]]));
}

/** First folder below server/, or the file's own name where it stands in server/ itself. */
function partOf(path: string): string {
  return relative(server, path).split("/")[0] ?? "";
}

function floorOf(part: string): number {
  return floors.findIndex((floor) => floor.includes(part));
}

const all: readonly Import[] = sources(server).flatMap((from) =>
  importsOf(from)
    .filter((name) => name.startsWith("."))
    .map((name) => ({ from, to: normalize(join(dirname(from), name)) })),
);
const inside = all.filter((each) => each.to.startsWith(`${server}/`));
const across = inside.filter((each) => partOf(each.from) !== partOf(each.to).replace(/\.js$/, ".ts"));

function shown(imports: readonly Import[]): readonly string[] {
  return imports.map((each) => `${relative(server, each.from)} imports ${relative(server, each.to)}`);
}

describe("the program's floors", () => {
  test("every file stands in a folder that has a floor", () => {
    const strangers = sources(server).filter((path) => floorOf(partOf(path)) < 0);
    expect(strangers.map((path) => relative(server, path))).toEqual([]);
  });

  test("an import never points upwards", () => {
    const upward = across.filter(
      (each) => floorOf(partOf(each.to).replace(/\.js$/, ".ts")) < floorOf(partOf(each.from)),
    );
    expect(across.length).toBeGreaterThan(20);
    expect(shown(upward)).toEqual([]);
  });

  test("folders of one floor do not import each other both ways", () => {
    const pairs = new Set(across.map((each) => `${partOf(each.from)} > ${partOf(each.to)}`));
    const both = [...pairs].filter((pair) => pairs.has(pair.split(" > ").reverse().join(" > ")));
    expect(both).toEqual([]);
  });

  test("nothing outside server/ is imported but the project's own description", () => {
    const outside = all.filter((each) => !inside.includes(each));
    expect(shown(outside.filter((each) => each.to !== join(projectRoot, "package.json")))).toEqual([]);
  });

  test("the core knows no clock, no chance, no disk, no network and no process", () => {
    const banned =
      /\bDate\b|\bMath\.random\b|\bprocess\.|\bsetTimeout\b|\bperformance\.|\bfetch\(|\bconsole\./;
    const faults = core
      .flatMap((part) => sources(join(server, part)))
      .flatMap((path) => {
        const packages = importsOf(path).filter((name) => !name.startsWith(".") && !corePackages.test(name));
        const word = banned.exec(codeOf(path))?.[0];
        return [...packages, ...(word === undefined ? [] : [word])].map(
          (what) => `${relative(server, path)}: ${what}`,
        );
      });
    expect(faults).toEqual([]);
  });

  test("the unit parser is loaded only where case documents are read", () => {
    const elsewhere = sources(server).filter(
      (path) => partOf(path) !== "case" && importsOf(path).some((name) => name.startsWith("mathjs")),
    );
    expect(elsewhere.map((path) => relative(server, path))).toEqual([]);
  });
});
