import { join } from "node:path";
import ejs from "ejs";
import express, { type Express } from "express";
import { notice } from "../screening/notice.js";
import { projectRoot, type Settings } from "../settings.js";
import { termNamed } from "../words/glossary.js";
import { program } from "../words/program.js";
import { signedInOnly, unforwardedOnly } from "./access.js";
import { jsonInterface } from "./api.js";
import { loadAssets } from "./assets.js";
import { endUnread, limitBodies } from "./bodies.js";
import { casePages } from "./casePages.js";
import { checksPages } from "./checksPages.js";
import { comparePages } from "./comparePages.js";
import { compressedText } from "./compression.js";
import { glossaryPages } from "./glossaryPages.js";
import { health } from "./health.js";
import { homePages } from "./homePages.js";
import { interfacePage } from "./interfacePage.js";
import { controlId } from "./places.js";
import { answerErrors, refuse } from "./problems.js";
import { progressPages } from "./progressPages.js";
import { limitRate } from "./rateLimit.js";
import { registerFiling } from "./registerFiling.js";
import { registerPages } from "./registerPages.js";
import { registerVerify } from "./registerVerify.js";
import { requestLog } from "./requestLog.js";
import { headers, ownHostOnly, ownOriginWrites } from "./security.js";
import type { Services } from "./services.js";

/** The whole web application, ready to listen. */
export function createApp(settings: Settings, services: Services): Express {
  const app = express();
  const assets = loadAssets();

  app.disable("x-powered-by");
  app.engine("ejs", ejs.renderFile);
  app.set("view engine", "ejs");
  app.set("views", join(projectRoot, "views"));
  app.enable("view cache");
  app.locals.asset = assets.address;
  app.locals.notice = notice;
  app.locals.program = program;
  app.locals.controlId = controlId;
  app.locals.termNamed = termNamed;

  // Behind a proxy on this machine, the client is whom the proxy names.
  if (settings.publicHosts.length > 0) app.set("trust proxy", "loopback");

  app.use(headers(), health(services.ready));
  app.use(requestLog(services.log), ownHostOnly([settings.host, ...settings.publicHosts]), ownOriginWrites());
  app.use(endUnread(), assets.serve, limitRate(), limitBodies(), compressedText());
  app.use(settings.accessHash === null ? unforwardedOnly() : signedInOnly(settings.accessHash));
  app.use("/api", jsonInterface(services));
  app.use(homePages(services), registerFiling(services), casePages(services), progressPages(services));
  app.use(comparePages(services), registerPages(services), registerVerify(services));
  app.use(glossaryPages(), checksPages(), interfacePage(services));
  app.use((request, response) => {
    refuse(request, response, {
      status: 404,
      title: "Not Found",
      detail: "There is no page at this address.",
      faults: [],
    });
  });
  app.use(answerErrors(services.log));
  return app;
}
