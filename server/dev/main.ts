import { startForecastFake } from './forecast-fake.ts';
import { devSettings } from './dev-settings.ts';
import { startMailSink } from './mail-sink.ts';

const settings = devSettings(process.argv.slice(2));
const sink = await startMailSink({
  smtpPort: settings.smtpPort,
  httpPort: settings.httpPort,
  directory: settings.directory,
});
const forecast = await startForecastFake(settings.forecastPort);
process.stdout.write('ready\n');
for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.once(signal, () => void Promise.all([sink.stop(), forecast.stop()]));
