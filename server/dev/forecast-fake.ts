import express from 'express';
import type { Server } from 'node:http';
import { z } from 'zod';

const querySchema = z.object({
  latitude: z.coerce.number().min(-90).max(90),
  longitude: z.coerce.number().min(-180).max(180),
  hours: z.coerce.number().int().min(1).max(120).default(48),
});

const hourMs = 3_600_000;

/** Smooth invented weather of one hour: it depends on place and hour only, so every answer can be had again. */
function weatherAt(place: { latitude: number; longitude: number }, hourMsSinceEpoch: number) {
  const hour = hourMsSinceEpoch / hourMs;
  const wave = (periodHours: number, shift: number) => Math.sin((2 * Math.PI * hour) / periodHours + shift);
  const shift = place.latitude + place.longitude;
  return {
    at: new Date(hourMsSinceEpoch).toISOString(),
    windSpeedMPerS: Math.max(0, 7 + 4 * wave(37, shift) + 2 * wave(11, 2 * shift)),
    windDirectionDeg: (((200 + 60 * wave(53, shift)) % 360) + 360) % 360,
    airTemperatureC: 1 + 4 * wave(24, shift),
    precipitationMmPerHour: Math.max(0, 1.2 * wave(29, shift) - 0.4),
  };
}

/** Serves invented hourly forecasts on loopback; a stand-in for the weather service of a utility. */
export function startForecastFake(port: number): Promise<{ stop: () => Promise<void> }> {
  const app = express();
  app.get('/forecast', (request, response) => {
    const query = querySchema.safeParse(request.query);
    if (!query.success) {
      response
        .status(400)
        .json({ error: query.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`) });
      return;
    }
    const first = Math.floor(Date.now() / hourMs) * hourMs;
    const hours = Array.from({ length: query.data.hours }, (_, index) => weatherAt(query.data, first + index * hourMs));
    response.json({ notice: 'invented weather, for trials only', hours });
  });
  return new Promise((resolve) => {
    const server: Server = app.listen(port, '127.0.0.1', () =>
      resolve({
        stop: () => {
          server.closeAllConnections();
          return new Promise<void>((stopped) => server.close(() => stopped()));
        },
      }),
    );
  });
}
