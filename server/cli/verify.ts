import { standardStreams } from "./output.js";
import { verifyCommand } from "./verifyCommand.js";

process.exitCode = await verifyCommand(process.argv.slice(2), standardStreams(), process.env);
