import { backupCommand } from "./backupCommand.js";
import { standardStreams } from "./output.js";

process.exitCode = await backupCommand(process.argv.slice(2), process.env, standardStreams());
