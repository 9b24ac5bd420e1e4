/** First sentence of the notice: the foot of every sheet page. */
export const noticeFirstSentence = "Screening estimate, not a basis of safety.";

/** The notice: first on every result page and in every findings document, verbatim. */
export const notice = `${noticeFirstSentence} It must be reviewed by a qualified process-safety professional before any use in a plant. Local codes, site rules and licensed practice take precedence. Perfect mixing, a closed recipe and the stated kinetics are assumed; gas, pressure and relief are not assessed.`;
