// Says what is missing or wrong in the environment, a line each, and starts nothing.
import { ConfigFaults, readConfig } from '#server/platform/config.ts';

try {
  readConfig();
} catch (error) {
  if (!(error instanceof ConfigFaults)) throw error;
  for (const fault of error.faults) console.error(fault);
  process.exitCode = 1;
}
