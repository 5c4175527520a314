import { z } from 'zod';
import { addressField } from './address';
import { roles } from '@/lib/access';
import { cleanLine } from '@/lib/rich-text/names';

export const nameField = z
  .string()
  .max(1000)
  .transform((value) => cleanLine(value, 80))
  .refine((value) => value !== '', 'Write the name.');

const role = z.enum(roles, { error: 'Choose a role.' });
const department = z
  .string()
  .max(40)
  .transform((value) => value || null);
const orderNumber = z.string().trim().max(20);

export const orderNumberField = orderNumber.min(1, 'Write the order number, such as Q-2417.');
export const idField = z.string().min(1).max(40);

export const invitation = z.object({ name: nameField, email: addressField, role, department, orderNumber });
export type Invitation = z.output<typeof invitation>;

export const changedPerson = z.object({ userId: idField, role, department });
export type ChangedPerson = z.output<typeof changedPerson>;

const MAX_ORDERS_AT_ONCE = 100;

export const assignment = z.object({
  userId: z.string().min(1, 'Choose who is to work on them.').max(40),
  orderNumbers: z
    .string()
    .max(4000)
    .transform((value) => [...new Set(value.split(/[\s,;]+/).filter(Boolean))])
    .refine((list) => list.length > 0, 'Write at least one order number, such as Q-2417.')
    .refine(
      (list) => list.length <= MAX_ORDERS_AT_ONCE,
      `At most ${MAX_ORDERS_AT_ONCE} orders at once. Assign the rest in a second go.`,
    ),
  cleared: z
    .enum(['on'])
    .optional()
    .transform((value) => value === 'on'),
});
export type Assignment = z.output<typeof assignment>;

export const stepInForm = z.object({
  orderNumber: orderNumberField,
  reason: z
    .string()
    .max(2000)
    .transform((value) => cleanLine(value, 300))
    .refine((value) => value.length >= 8, 'Write why, in a few words. The owner of the build can read it.'),
});
export type StepIn = z.output<typeof stepInForm>;

export const personRef = z.object({ userId: idField });
export const assignmentRef = z.object({ assignmentId: idField });
export const companionRef = z.object({ orderNumber: orderNumberField, userId: idField });

export const companionForm = z.object({ orderNumber: orderNumberField, name: nameField, email: addressField });
