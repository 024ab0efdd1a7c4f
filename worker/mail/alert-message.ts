import { reasonSentence } from '#shared/contract/reason-sentences.ts';
import type { AlertLine, Delivery } from '#server/data/deliveries.repository.ts';

export interface Message {
  readonly subject: string;
  readonly text: string;
}

const mostListed = 200;
const caution = [
  'Stillspan assists licensed engineers. Local codes, the rules of the line owner and the procedures for live-line work',
  'and work at height come first.',
].join('\n');

function linkOf(publicUrl: string, alert: AlertLine): string {
  const link = new URL(`/sections/${alert.sectionId}`, publicUrl);
  link.searchParams.set('span', alert.spanId);
  link.searchParams.set('wire', alert.wireId);
  return link.href;
}

function placeOf(alert: AlertLine): string {
  return `${alert.lineName}, span ${alert.spanLabel}, wire ${alert.wireName}`;
}

function paragraphOf(publicUrl: string, alert: AlertLine): string {
  const sentences = alert.reasons.map((reason) => `  - ${reasonSentence(reason, 'metric')}`);
  return [
    `${placeOf(alert)}${alert.isAssumed ? ' (rests on assumed data)' : ''}`,
    ...sentences,
    `  ${linkOf(publicUrl, alert)}`,
  ].join('\n');
}

function digestOf(publicUrl: string, alerts: readonly AlertLine[]): string {
  const listed = alerts.slice(0, mostListed).map((alert) => {
    const [leading] = alert.reasons;
    const why = leading === undefined ? '' : ` ${reasonSentence(leading, 'metric')}`;
    return `- ${placeOf(alert)}.${why}\n  ${linkOf(publicUrl, alert)}`;
  });
  const rest = alerts.length - listed.length;
  const more = rest > 0 ? [`and ${rest} more: ${new URL('/alerts', publicUrl).href}`] : [];
  return [...listed, ...more].join('\n');
}

/** The e-mail of a delivery: one span wire with its reasons, or the list of a digest. */
export function alertMessage(delivery: Delivery, alerts: readonly AlertLine[], publicUrl: string): Message {
  const [first] = alerts;
  if (first === undefined) throw new Error(`delivery ${delivery.id} tells of no alert`);
  const head = `${delivery.recipientName},\n`;
  const foot = `Acknowledge: ${new URL('/alerts', publicUrl).href}\n\n${caution}\n\n${delivery.utilityName}, sent by Stillspan`;
  if (delivery.isDigest) {
    const body = `${alerts.length} span wires became Urgent in one assessment, worst first.\n\n${digestOf(publicUrl, alerts)}`;
    return { subject: `Urgent: ${alerts.length} span wires`, text: [head, body, '', foot].join('\n') };
  }
  const body = `A span wire became Urgent.\n\n${paragraphOf(publicUrl, first)}`;
  return { subject: `Urgent: ${placeOf(first)}`, text: [head, body, '', foot].join('\n') };
}
