import { FieldError } from '@/components/ui/field';
import type { MailPlan } from '@/lib/mail/plan-words';

type Choice = { value: MailPlan['cadence']; label: string; hint: string };

const choices: Record<'client' | 'shop', Choice[]> = {
  client: [
    { value: 'at_once', label: 'At once', hint: 'A mail for every new page.' },
    { value: 'daily', label: 'Every day', hint: 'What is new since the day before, at your hour.' },
    { value: 'weekly', label: 'Every week', hint: 'What is new since the week before, on your day and at your hour.' },
    { value: 'none', label: 'No diary mail', hint: 'You read it here. Answers to your questions still come by mail.' },
  ],
  shop: [
    { value: 'at_once', label: 'At once', hint: 'A mail for whatever you chose to have in the digest.' },
    { value: 'daily', label: 'Every day', hint: 'What waits on you, at your hour, when there is something.' },
    { value: 'weekly', label: 'Every week', hint: 'What waits on you, on your day and at your hour.' },
    { value: 'none', label: 'No digest', hint: 'What you chose to have in the digest does not come at all.' },
  ],
};

const legends = { client: 'How the diary comes to you', shop: 'How your digest comes to you' };

type CadenceChoiceProps = { side: 'client' | 'shop'; chosen: string; error?: string };

/** How often the digest comes, one of four. */
export function CadenceChoice({ side, chosen, error }: CadenceChoiceProps) {
  return (
    <fieldset aria-describedby={error ? 'cadence-error' : undefined}>
      <legend className="mb-1.5 font-semibold">{legends[side]}</legend>
      <div className="border-t border-line">
        {choices[side].map(({ value, label, hint }) => (
          <label key={value} className="flex items-start gap-3 border-b border-line py-2.5">
            <input
              type="radio"
              name="cadence"
              value={value}
              defaultChecked={value === chosen}
              className="mt-0.5 size-5 shrink-0 accent-finish-deep"
            />
            <span>
              <span className="block font-semibold">{label}</span>
              <span className="block text-sm text-soft">{hint}</span>
            </span>
          </label>
        ))}
      </div>
      <FieldError id="cadence" error={error} />
    </fieldset>
  );
}
