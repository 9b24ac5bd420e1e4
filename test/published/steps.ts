export { plainStep as stepWith } from "../../server/screening/checks/plainStep.js";
