import { type DestinationStream, type LogFn, type Logger, pino } from "pino";

/** Of the way to an error, what is enough to find it. */
const mostFrames = 12;

/**
 * The log of the server. It never holds what someone typed: messages of errors may quote that, so an error is logged
 * by its kind, its code and where it happened.
 */
export function createLog(destination: DestinationStream): Logger {
  return pino({ level: "info", serializers: { err: traceOf }, hooks: { logMethod: withWords } }, destination);
}

/** Where an entry has no words of its own, the logger would take those of the error. */
function withWords(this: Logger, given: Parameters<LogFn>, log: LogFn): void {
  const [what, ...words] = given;
  log.apply(this, typeof what === "object" && words.length === 0 ? [what, "failed"] : given);
}

function traceOf(error: unknown) {
  if (!(error instanceof Error)) return { type: typeof error };
  const lines = (error.stack ?? "").split("\n");
  const last = lines.findLastIndex((line) => !/^ {4}at \S/.test(line));
  return {
    type: error.name,
    ...("code" in error && { code: String(error.code) }),
    at: lines.slice(last + 1, last + 1 + mostFrames).map((line) => line.trim().slice(3)),
  };
}
