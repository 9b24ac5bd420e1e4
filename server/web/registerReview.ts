import { z } from "zod";
import type { ReviewToEnter } from "../files/register.js";

const fields = ["reviewer", "reviewedOn", "conclusion", "remark"] as const;
type ReviewField = (typeof fields)[number];

/** The form of a review as it was filled in. */
export type TypedReview = Readonly<Record<ReviewField, string>>;

export const blankReview: TypedReview = { reviewer: "", reviewedOn: "", conclusion: "", remark: "" };

export type ReadReview =
  | { readonly ok: true; readonly typed: TypedReview; readonly review: ReviewToEnter }
  | {
      readonly ok: false;
      readonly typed: TypedReview;
      readonly faults: Readonly<Partial<Record<ReviewField, string>>>;
    };

const longest = { reviewer: 300, remark: 4000 };
const day = z.iso.date();

/** Reads the form of a review. */
export function readReview(body: Readonly<Record<string, unknown>>): ReadReview {
  const value = (field: ReviewField) => {
    const given = body[field];
    return typeof given === "string" ? given.trim() : "";
  };
  const typed: TypedReview = {
    reviewer: value("reviewer"),
    reviewedOn: value("reviewedOn"),
    conclusion: value("conclusion"),
    remark: value("remark"),
  };
  const faults: Partial<Record<ReviewField, string>> = {};
  const { reviewer, reviewedOn, conclusion, remark } = typed;
  if (reviewer === "") faults.reviewer = "Who reviewed the sheet?";
  if (reviewer.length > longest.reviewer)
    faults.reviewer = `At most ${longest.reviewer} characters would do.`;
  if (!day.safeParse(reviewedOn).success) faults.reviewedOn = "The day of the review, such as 2026-03-07.";
  if (remark.length > longest.remark) faults.remark = `At most ${longest.remark} characters would do.`;
  if (conclusion === "objection" && remark === "") faults.remark = "What is the objection?";
  if (conclusion !== "no objection" && conclusion !== "objection") {
    return { ok: false, typed, faults: { ...faults, conclusion: "What did the review come to?" } };
  }
  if (Object.keys(faults).length > 0) return { ok: false, typed, faults };
  return { ok: true, typed, review: { reviewer, reviewedOn, conclusion, remark: remark || null } };
}
