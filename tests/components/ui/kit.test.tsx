import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { NeckTrack } from '@/components/builds/neck-track';
import { NeckNames, NeckStrip } from '@/components/builds/neck-track-strip';
import { FinishStyle } from '@/components/builds/finish-style';
import { TopBar } from '@/components/shell/top-bar';
import { Avatar, initialsOf } from '@/components/ui/avatar';
import { Button, LinkButton } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { Mark } from '@/components/ui/mark';
import { Notice } from '@/components/ui/notice';
import { ProgressBar } from '@/components/ui/progress-bar';
import { SectionHeading } from '@/components/ui/section-heading';
import { Segmented } from '@/components/ui/segmented';
import { Select } from '@/components/ui/select';
import { SkeletonText } from '@/components/ui/skeleton';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { TextArea, TextInput } from '@/components/ui/text-input';

const stages = [
  { name: 'Blanks', state: 'done' as const },
  { name: 'Frets', state: 'now' as const },
  { name: 'Final check', state: 'ahead' as const },
];
const choices = [
  { value: 'buyer', label: 'Buyer sees it' },
  { value: 'shop', label: 'Shop only' },
];

const kit: Record<string, ReactElement> = {
  NeckTrack: <NeckTrack stages={stages} nowShare={0.5} hasMoved />,
  NeckStrip: <NeckStrip stages={stages} nowShare={0.5} finishHex="#ffffff" />,
  NeckNames: <NeckNames names={['Blanks', 'Frets']} />,
  FinishStyle: <FinishStyle finishHex="#ffff00" nonce="abc" />,
  TopBar: (
    <TopBar shopName="Quillhaven" personName="Maren Oyelaran" links={[{ href: '/q', label: 'Questions', count: 5 }]} />
  ),
  Avatar: <Avatar name="Tove Järvi" />,
  Button: <Button variant="danger">Revoke</Button>,
  LinkButton: <LinkButton href="/spec">Full spec</LinkButton>,
  Checkbox: <Checkbox label="Include photos" hint="Up to 12." name="photos" />,
  Dialog: (
    <Dialog isOpen={false} onClose={() => undefined} title="Withdraw this entry" actions={<Button>Withdraw</Button>} />
  ),
  EmptyState: <EmptyState title="No questions yet" />,
  Mark: <Mark />,
  Notice: <Notice tone="brass" title="Your sign-off is holding the next step" />,
  ProgressBar: <ProgressBar share={0.62} label="Sending photo" />,
  SectionHeading: <SectionHeading note="3 entries">Colour</SectionHeading>,
  Segmented: <Segmented legend="Who sees it" name="audience" options={choices} defaultValue="shop" />,
  Select: <Select label="Who sees it" options={choices} prompt="Choose" />,
  SkeletonText: <SkeletonText />,
  Table: (
    <Table caption="Builds" columns={[{ key: 'order', label: 'Order' }]}>
      <Row>
        <RowHead>Q-2417</RowHead>
        <Cell note="usual 2 to 4">4 d</Cell>
      </Row>
    </Table>
  ),
  TextArea: <TextArea label="Note" />,
  TextInput: <TextInput label="E-mail" />,
};

test.each(Object.entries(kit))(
  '%s renders without a style attribute, which the content security policy would refuse',
  (_, element) => {
    const markup = renderToStaticMarkup(element);
    expect(markup.length).toBeGreaterThan(0);
    expect(markup).not.toMatch(/\sstyle=/);
  },
);

describe('a field', () => {
  const markup = renderToStaticMarkup(
    <TextInput
      id="order"
      label="Order number"
      hint="On the rack tag."
      error="No build has this number. Check the tag."
    />,
  );

  test('is tied to its label, its hint and its error', () => {
    expect(markup).toContain('<label for="order"');
    const [, described = ''] = markup.match(/aria-describedby="([^"]*)"/) ?? [];
    expect(described.split(' ')).toEqual(['order-hint', 'order-error']);
    for (const id of described.split(' ')) expect(markup).toContain(`<p id="${id}"`);
    expect(markup).toContain('aria-invalid="true"');
  });

  test('without an error is not called invalid', () => {
    expect(renderToStaticMarkup(<TextInput id="order" label="Order number" />)).not.toContain('aria-invalid=');
  });

  test('keeps an id of its own where two share a name', () => {
    const pair = renderToStaticMarkup(
      <>
        <TextInput label="First" name="same" />
        <TextInput label="Second" name="same" />
      </>,
    );
    const ids = [...pair.matchAll(/<input[^>]* id="([^"]*)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(2);
  });
});

test('exactly the default choice of a segmented control is picked', () => {
  const markup = renderToStaticMarkup(<Segmented legend="Who" name="who" options={choices} defaultValue="shop" />);
  const picked = [...markup.matchAll(/<input[^>]*>/g)]
    .map(([input]) => input)
    .filter((input) => input.includes('checked=""'));
  expect(picked).toHaveLength(1);
  expect(picked[0]).toContain('value="shop"');
});

test.each([
  [-0.5, 0],
  [0, 0],
  [0.624, 62],
  [7, 100],
])('a progress bar of %d says %d percent', (share, percent) => {
  expect(renderToStaticMarkup(<ProgressBar share={share} label="Sending" />)).toContain(`aria-valuenow="${percent}"`);
});

test.each([
  ['Maren Oyelaran', 'MO'],
  ['  Ana  de la Rosa ', 'AR'],
  ['Õnne', 'Õ'],
  ['', ''],
])('the initials of %j are %j', (name, initials) => {
  expect(initialsOf(name)).toBe(initials);
});
