import { Notice } from '../ui/notice.tsx';

/** Stands on the row, the warrant and the disposition of safety and regulatory characteristics. */
export const safetyCaution =
  "Acceptance here records a decision by an authorised person. It does not replace the design authority's approval, " +
  "the law or the customer's own requirements, and no automatic result approves such a characteristic.";

/** Stands beside every capability figure. */
export const capabilityCaution = 'Capability figures assume a stable process.';
export const capabilityNotShownStable = `${capabilityCaution} Stability was not shown for these values.`;

/** `balloons` names the characteristics concerned where there is more than one row on the page. */
export function SafetyCaution({ balloons = [] }: { balloons?: readonly string[] }) {
  const which = balloons.length === 0 ? '' : `: balloon ${balloons.join(', ')}`;
  return (
    <Notice tone="attention" title={`Safety or regulatory characteristic${which}`}>
      {safetyCaution}
    </Notice>
  );
}

export function CapabilityCaution({ stable }: { stable: boolean }) {
  return <p className="caption">{stable ? capabilityCaution : capabilityNotShownStable}</p>;
}
