import type { RouteDefinition } from '#shared/contract/route.ts';
import { apiPrefix, apiRoutes } from '#shared/contract/routes.ts';

function escaped(text: string): string {
  return text.replace(/[&<>"]/g, (character) => `&#${character.charCodeAt(0)};`);
}

function rowOf(name: string, definition: RouteDefinition): string {
  const access = typeof definition.access === 'string' ? definition.access : definition.access.join(', ');
  return `<tr id="${name}"><td><code>${definition.method.toUpperCase()}</code></td><td><code>${escaped(apiPrefix + definition.path)}</code></td>
    <td>${escaped(definition.summary)}</td><td>${escaped(access)}</td><td>${escaped(definition.problems.join(', '))}</td></tr>`;
}

/** A page for people: every route, what it does and who may call it. The schemas are in the OpenAPI document. */
export function readingPage(): string {
  const rows = Object.entries(apiRoutes).map(([name, definition]) => rowOf(name, definition));
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
    <title>Stillspan API</title><style>body{font-family:sans-serif;margin:2rem;max-width:80rem}table{border-collapse:collapse;width:100%}
    th,td{text-align:left;padding:.4rem .8rem;border-bottom:1px solid #9aa8ae;vertical-align:top}</style></head><body>
    <h1>Stillspan API</h1><p>Schemas of requests and answers: <a href="${apiPrefix}/openapi.json">openapi.json</a> (OpenAPI 3.1).
    All quantities are in SI units and each name carries its unit. Errors are problem documents (RFC 9457).</p>
    <table><thead><tr><th>Method</th><th>Path</th><th>What it does</th><th>Who may</th><th>Problems</th></tr></thead>
    <tbody>${rows.join('\n')}</tbody></table></body></html>`;
}
