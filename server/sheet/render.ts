import type { Figure } from "../charts/figure.js";
import { attachRecord, recordBytes } from "../records/attach.js";
import type { Filing } from "../records/filing.js";
import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { writeCautions, writeSignatures } from "./closing.js";
import { closeDocument, openDocument, type Paper } from "./document.js";
import { drawableFigures, drawFigure, figureRoom } from "./figures.js";
import { writeRunning } from "./foot.js";
import { type TitleBlock, writeFront } from "./front.js";
import { writeInputs } from "./inputs.js";
import { writeInputWorkings } from "./inputWorkings.js";
import { heading, newPage, startPages } from "./page.js";
import { writeResults } from "./results.js";
import { writeWorking } from "./working.js";

export interface SheetInput {
  /** the case as typed */
  readonly document: TitleBlock;
  readonly model: CaseModel;
  readonly findings: Findings;
  readonly paper: Paper;
  /** where it stands in the register; left out of a sheet that is only printed */
  readonly filing?: Filing;
}

/**
 * The sheet that is filed: page one for whoever reads nothing else, then inputs, findings, figures,
 * working, cautions and space to sign. The same input gives the same bytes (of one version of Node,
 * whose zlib packs them).
 */
export async function renderSheet({ document, model, findings, paper, filing }: SheetInput): Promise<Buffer> {
  const program = `${findings.program.name} ${findings.program.version}`;
  const record = document.batch?.record ?? null;
  const pdf = openDocument(paper, {
    title: record === null ? document.title : `${record}: ${document.title}`,
    subject: findings.notice,
    producer: program,
    keywords: `case ${findings.digest}`,
  });
  const figures = drawableFigures(findings);
  const picture = pictureOf(figures);
  const cursor = startPages(pdf);
  writeFront(cursor, { document, findings, filing, picture });
  newPage(cursor);
  writeInputs(cursor, document, model.inputs);
  writeInputWorkings(cursor, findings.workings);
  writeResults(cursor, findings);
  const others = figures.filter((figure) => figure !== picture);
  if (others.length > 0) heading(cursor, "Figures", 30 + figureRoom(cursor, others[0]));
  for (const figure of others) drawFigure(cursor, figure);
  writeWorking(cursor, model, findings);
  writeCautions(cursor, findings.cautions, findings);
  writeSignatures(cursor, document.batch?.preparedBy ?? null, findings.digest, filing);
  cursor.parent.end();
  writeRunning(cursor, {
    title: document.title,
    record,
    program,
    digest: findings.digest,
    filing,
  });
  attachRecord(pdf, recordBytes(document, findings, filing));
  return closeDocument(pdf);
}

/** The picture of page one: window and ladder where there is a window, else the ladder alone. */
function pictureOf(figures: readonly Figure[]): Figure | null {
  return (
    figures.find((figure) => figure.id === "window") ??
    figures.find((figure) => figure.id === "ladder") ??
    null
  );
}
