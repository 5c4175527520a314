'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type Topic = {
  id: string;
  name: string;
  answeredBy: 'department' | 'rep';
  department: string | null;
  repsOnly: boolean;
  dueHours: number;
};

type TopicFormProps = { save: FormAction; topic?: Topic; departments: { key: string; name: string }[] };

const answersOf = ({ answeredBy, department, repsOnly }: Topic) =>
  answeredBy === 'department' ? (department ?? '') : repsOnly ? 'reps_only' : 'rep';

/** One topic in a line: its name, who answers it, and how soon. */
export function TopicForm({ save, topic, departments }: TopicFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  const typed = refused?.values ?? {};
  const answers = typed.answers ?? (topic ? answersOf(topic) : '');
  const options = [
    { value: 'rep', label: 'The rep' },
    { value: 'reps_only', label: 'The rep, and no builder reads it' },
    ...departments.map(({ key, name }) => ({ value: key, label: `The builder in ${name}` })),
  ];
  return (
    <form action={send} className="grid gap-3 border-b border-line pb-6">
      <HiddenFields values={{ topicId: topic?.id ?? '' }} />
      <div className="grid gap-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_8rem_auto] sm:items-end">
        <TextInput
          label="Name"
          name="name"
          required
          maxLength={60}
          autoComplete="off"
          defaultValue={typed.name ?? topic?.name}
          error={refused?.fields.name}
        />
        <Select
          key={answers}
          label="Who answers"
          name="answers"
          prompt={topic ? undefined : 'Choose'}
          options={options}
          defaultValue={answers}
          error={refused?.fields.answers}
        />
        <TextInput
          label="Working hours"
          name="dueHours"
          type="number"
          inputMode="numeric"
          min={1}
          max={200}
          required
          defaultValue={typed.dueHours ?? topic?.dueHours ?? 8}
          error={refused?.fields.dueHours}
        />
        <Button
          type="submit"
          variant="quiet"
          disabled={isSending}
          aria-label={topic ? `Keep ${topic.name}` : 'Add the topic'}
          className="min-h-11"
        >
          {topic ? 'Keep' : 'Add'}
        </Button>
      </div>
      <FormOutcome state={state} shown={['name', 'answers', 'dueHours']} />
    </form>
  );
}
