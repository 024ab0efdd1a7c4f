/** Trade words of the product, in the order in which a newcomer meets them. */
export const glossary: readonly { word: string; meaning: string }[] = [
  { word: 'Section', meaning: 'Wires from dead-end to dead-end; its spans share one tension and one ruling span.' },
  { word: 'Span wire', meaning: 'One wire in one span: the thing that is assessed.' },
  {
    word: 'Aeolian vibration',
    meaning: 'Small, fast vibration by vortices in a light steady wind; bends strands at clamps until they break.',
  },
  { word: 'Galloping', meaning: 'Slow motion of an iced wire, metres high; phases may clash.' },
  {
    word: 'Loop, node, antinode',
    meaning: 'A vibrating wire moves most at antinodes and not at nodes; a loop lies between two nodes.',
  },
  { word: 'Amplitude', meaning: 'Zero to peak at an antinode, unless a line says peak to peak.' },
  {
    word: 'Reflection',
    meaning: 'Share of an arriving wave that an end sends back. A bare clamp sends back all; a good damper little.',
  },
  { word: 'Self-damping', meaning: 'What the strands of the wire itself take out of the vibration.' },
  {
    word: 'Endurance limit',
    meaning: 'Bending stress below which strands are taken to last; its source stands beside each number.',
  },
  { word: 'H/w', meaning: 'Tension over weight per metre; the higher, the less the wire damps itself.' },
  { word: 'Placement', meaning: 'A damper at a distance from the clamp: planned, or as-built.' },
  { word: 'Basis', meaning: 'A named, versioned set of methods, limits and thresholds that an assessment uses.' },
  { word: 'Stale', meaning: 'An input changed since the assessment; a new one is due.' },
  { word: 'Assumed', meaning: 'Spans, wires or tensions come from choices at import, not from a survey.' },
];

export const standings: readonly { word: string; meaning: string }[] = [
  { word: 'published', meaning: 'read in the named source' },
  { word: 'closed form', meaning: 'derived, and computed a second way' },
  { word: 'common practice', meaning: 'used in the trade, no source claimed' },
  { word: 'from memory', meaning: 'recalled; the source was not read and must be checked before anyone relies on it' },
  { word: 'own model', meaning: 'our own, stated as such' },
];
