import { accessHashCommand } from "./accessHashCommand.js";
import { standardStreams } from "./output.js";
import { typedPassword } from "./typedPassword.js";

process.exitCode = await accessHashCommand(process.argv.slice(2), typedPassword, standardStreams());
