/** What the supplier's signatory declares; part of what is signed, so a change of words changes the digest. */
export const declaration = [
  'I declare that the sample pieces of this package were made with the production tools, process, site, material and people',
  'stated, in the run stated; that the readings, results and documents belong to these pieces and to the drawing revision named;',
  'that every deviation from the requirements is listed; and that I am authorised to sign for the supplier.',
].join(' ');

export const meanings = {
  warrant: 'Submitted: the declaration above is made for the supplier',
  approved: 'Approved for production',
  'interim-approval': 'Interim approval within the limits stated',
  rejected: 'Rejected for the reasons stated',
  'sent-back': 'Sent back as incomplete; not a judgement on the parts',
} as const;

/** The caution that stands wherever a safety or regulatory characteristic is decided or signed for. */
export function safetyCaution(balloons: readonly string[]): string | null {
  if (balloons.length === 0) return null;
  const which =
    balloons.length === 1
      ? `Characteristic ${balloons[0] ?? ''} is`
      : `Characteristics ${balloons.join(', ')} are`;
  return `${which} marked safety or regulatory. Acceptance here records a decision by an authorised person. It does not replace the design authority's approval, the law or the customer's own requirements, and no automatic result approves such a characteristic.`;
}
