import { standardStreams } from "./output.js";
import { screenCommand } from "./screenCommand.js";

process.exitCode = await screenCommand(process.argv.slice(2), standardStreams());
