import { parseArgs } from 'node:util';
import { z } from 'zod';

const port = z.coerce.number().int().min(1).max(65535);
const schema = z.object({ 'smtp-port': port, 'http-port': port, 'forecast-port': port, directory: z.string().min(1) });

/** Settings of the local stand-ins, from the command line: they are not settings of the product. */
export function devSettings(argumentsGiven: string[]) {
  const option = { type: 'string' as const };
  const { values } = parseArgs({
    args: argumentsGiven,
    options: { 'smtp-port': option, 'http-port': option, 'forecast-port': option, directory: option },
  });
  const parsed = schema.parse(values);
  return {
    smtpPort: parsed['smtp-port'],
    httpPort: parsed['http-port'],
    forecastPort: parsed['forecast-port'],
    directory: parsed.directory,
  };
}
