import { type Request, type Response, Router, urlencoded } from "express";
import type { FiledSheet } from "../files/registerIndex.js";
import { searched } from "../files/registerSearch.js";
import { refuse } from "./problems.js";
import { registerCsv } from "./registerCsv.js";
import { addressOf, readQuery } from "./registerQuery.js";
import { diskRefusal } from "./registerRefusal.js";
import { blankReview, type ReadReview, readReview } from "./registerReview.js";
import { addressOfSheet, gapsOf, numberIn, rowOf, sheetView } from "./registerView.js";
import type { Services } from "./services.js";

const rowsOnPage = 100;

/** Pages of the register: the list with its search, one sheet, its files, its reviews. */
export function registerPages({ register, log }: Pick<Services, "register" | "log">): Router {
  const router = Router();

  router.get("/register", async (request, response) => {
    const index = await register.fresh();
    const { typed, faults, query } = readQuery(request.query);
    const sound = Object.keys(faults).length === 0;
    const found = sound ? searched(index.sheets(), query) : [];
    const pages = Math.max(1, Math.ceil(found.length / rowsOnPage));
    const page = Math.min(numberIn(request.query.page) ?? 1, pages);
    const address = (to: number) => addressOf("/register", typed, to);
    response.status(sound ? 200 : 400).render("register", {
      page: {
        title: "Register",
        wide: true,
        typed,
        faults,
        sound,
        gaps: gapsOf(index),
        total: index.sheets().length,
        count: found.length,
        rows: found.slice((page - 1) * rowsOnPage, page * rowsOnPage).map(rowOf),
        number: page,
        pages,
        newer: page > 1 ? address(page - 1) : null,
        older: page < pages ? address(page + 1) : null,
        csv: addressOf("/register.csv", typed),
      },
    });
  });

  router.get("/register.csv", async (request, response) => {
    const index = await register.fresh();
    const { faults, query } = readQuery(request.query);
    const [fault] = Object.values(faults);
    if (fault !== undefined) return refuse(request, response, { ...badSearch, detail: fault });
    response
      .attachment("register.csv")
      .type("text/csv")
      .send(registerCsv(searched(index.sheets(), query)));
  });

  router.get("/register/:number", async (request, response) => {
    const filed = await sheetOf(request);
    if (filed === null) return missing(request, response);
    return renderSheet(response, filed);
  });

  router.get("/register/:number/sheet.pdf", async (request, response) => {
    const filed = await sheetOf(request);
    if (filed === null) return missing(request, response);
    const pdf = await register.pdf(filed.sheet);
    if (pdf === null) return refuse(request, response, changed("PDF"));
    response.set("Content-Disposition", `inline; filename="sheet-${filed.sheet.number}.pdf"`);
    response.type("application/pdf").send(pdf);
  });

  router.get("/register/:number/record.json", async (request, response) => {
    const filed = await sheetOf(request);
    if (filed === null) return missing(request, response);
    const record = await register.record(filed.sheet);
    if (record === null) return refuse(request, response, changed("record"));
    response.attachment(`sheet-${filed.sheet.number}.json`).type("application/json").send(record);
  });

  const form = urlencoded({ extended: false, limit: "256kb" });
  router.post("/register/:number/reviews", form, async (request, response) => {
    const filed = await sheetOf(request);
    if (filed === null) return missing(request, response);
    const read = readReview(request.body ?? {});
    if (!read.ok) return renderSheet(response.status(422), filed, read);
    try {
      await register.review(filed.sheet.number, read.review);
    } catch (error) {
      const refusal = diskRefusal(error);
      if (refusal === null) throw error;
      log.error({ err: error }, "a review could not be entered");
      return renderSheet(
        response.status(refusal.status),
        filed,
        read,
        `${refusal.sentence} The review was not entered.`,
      );
    }
    response.redirect(303, `${addressOfSheet(filed.sheet.number)}#reviews`);
  });

  async function sheetOf(request: Request): Promise<FiledSheet | null> {
    const number = numberIn(request.params.number);
    return number === null ? null : (await register.fresh()).sheet(number);
  }

  async function renderSheet(
    response: Response,
    filed: FiledSheet,
    review?: ReadReview,
    refusal: string | null = null,
  ): Promise<void> {
    const view = sheetView(filed, await register.fresh());
    response.render("registerSheet", {
      page: {
        title: `${view.name}: ${view.row.title}`,
        sheet: view,
        review: review?.typed ?? blankReview,
        faults: review?.ok === false ? review.faults : {},
        refusal,
      },
    });
  }

  return router;
}

const badSearch = { status: 400, title: "Bad Request", faults: [] };

function changed(what: string) {
  return {
    status: 500,
    title: "Not the sheet that was filed",
    detail: `The ${what} of this sheet is missing or was changed since it was filed. It is not handed out; a backup may hold it.`,
    faults: [],
  };
}

function missing(request: Request, response: Response): void {
  refuse(request, response, {
    status: 404,
    title: "Not Found",
    detail: "There is no filed sheet at this address.",
    faults: [],
  });
}
