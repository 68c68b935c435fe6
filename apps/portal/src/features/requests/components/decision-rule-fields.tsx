import { NumberTextField } from '../../../components/ui/number-text-field.tsx';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import type { RequestFieldsProps } from './request-fields.tsx';

export function DecisionRuleFields({ values, set, errorOf, idOf }: RequestFieldsProps) {
  const rule = values.decisionRule;
  return (
    <div className="flex flex-col gap-3">
      <RadioGroup
        id={idOf('decisionRule')}
        name="decisionRule"
        label="Decision rule"
        error={errorOf('decisionRule')}
        value={rule.kind}
        onChange={(kind) =>
          set({
            decisionRule:
              kind === 'simple'
                ? { kind }
                : { kind, uncertaintyPercentOfTolerance: '10', proves: 'supplier' },
          })
        }
        options={[
          {
            value: 'simple',
            label: 'Simple acceptance',
            hint: 'A reading within the limits is in tolerance, one equal to a limit included.',
          },
          {
            value: 'guard-band',
            label: 'Guard band by the expanded uncertainty',
            hint: 'Where agreed: readings nearer to a limit than the uncertainty are undecided.',
          },
        ]}
      />
      {rule.kind === 'guard-band' && (
        <div className="grid gap-4 md:grid-cols-2">
          <NumberTextField
            id={idOf('decisionRule.uncertaintyPercentOfTolerance')}
            label="Expanded uncertainty (k = 2)"
            unit="% of the tolerance"
            error={errorOf('decisionRule.uncertaintyPercentOfTolerance')}
            value={rule.uncertaintyPercentOfTolerance}
            onChange={(uncertaintyPercentOfTolerance) =>
              set({ decisionRule: { ...rule, uncertaintyPercentOfTolerance } })
            }
          />
          <RadioGroup
            id={idOf('decisionRule.proves')}
            name="proves"
            label="Uncertainty counts against"
            inline
            value={rule.proves}
            onChange={(proves) => set({ decisionRule: { ...rule, proves } })}
            options={[
              { value: 'supplier', label: 'the supplier, who proves conformance' },
              { value: 'customer', label: 'the customer, who proves the fault' },
            ]}
          />
        </div>
      )}
    </div>
  );
}
