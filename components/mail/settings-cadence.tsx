import { FieldError } from '@/components/ui/field';
import type { MailPlan } from '@/lib/mail/plan-words';

const choices: { value: MailPlan['cadence']; label: string; hint: string }[] = [
  { value: 'at_once', label: 'At once', hint: 'A mail for every new page.' },
  { value: 'daily', label: 'Every day', hint: 'What is new since the day before, at your hour.' },
  { value: 'weekly', label: 'Every week', hint: 'What is new since the week before, on your day and at your hour.' },
  { value: 'none', label: 'No diary mail', hint: 'You read it here. Answers to your questions still come by mail.' },
];

/** How often the diary comes, one of four. */
export function CadenceChoice({ chosen, error }: { chosen: string; error?: string }) {
  return (
    <fieldset aria-describedby={error ? 'cadence-error' : undefined}>
      <legend className="mb-1.5 font-semibold">How the diary comes to you</legend>
      <div className="border-t border-line">
        {choices.map(({ value, label, hint }) => (
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
