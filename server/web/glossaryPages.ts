import { Router } from "express";
import { glossary } from "../words/glossary.js";
import { mathMl } from "../words/mathml.js";

/** Formulas of more characters may have to scroll on a telephone, and then the keyboard must reach them. */
const longFormula = 40;

/** The glossary: every term with its formula drawn, each under an anchor of its own. */
export function glossaryPages(): Router {
  const router = Router();
  const page = {
    title: "Glossary",
    groups: glossary.map((group) => ({
      ...group,
      terms: group.terms.map((term) => ({
        ...term,
        formula: term.formula === undefined ? null : mathMl(term.formula),
        long: (term.formula ?? "").length > longFormula,
      })),
    })),
  };
  router.get("/glossary", (_request, response) => response.render("glossary", { page }));
  return router;
}
