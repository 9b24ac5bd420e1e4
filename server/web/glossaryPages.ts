import { Router } from "express";
import { glossary } from "../words/glossary.js";
import { mathMl } from "../words/mathml.js";

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
      })),
    })),
  };
  router.get("/glossary", (_request, response) => response.render("glossary", { page }));
  return router;
}
