import type { ReactNode } from 'react';
import { ProofTable } from './proof-table';
import { Cautions } from '@/components/craft/cautions';
import { FingerboardDrawing } from '@/components/specs/fingerboard-drawing';
import { SectionHeading } from '@/components/ui/section-heading';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { AsBuiltSheet } from '@/lib/as-built/sheet';

type AsBuiltViewProps = { sheet: AsBuiltSheet; download: ReactNode };

/** The as-built sheet on the screen; paper says the same. */
export function AsBuiltView({ sheet, download }: AsBuiltViewProps) {
  return (
    <div className="mx-auto grid max-w-[82rem] gap-10 px-4.5 py-8 md:px-10 md:py-10">
      <header className="flex flex-wrap items-start justify-between gap-x-14 gap-y-6">
        <div className="min-w-0">
          <p className="narrow text-sm font-semibold text-soft">
            Order {sheet.orderNumber} · {sheet.version}
          </p>
          <h1 className="mt-1 text-3xl">As signed, as built</h1>
          <p className="mt-2 text-soft">
            <bdi>{sheet.instrument}</bdi> · {sheet.facts.join(' · ')}
          </p>
          <p className="mt-1 font-semibold">{sheet.standing}</p>
        </div>
        {download}
      </header>
      {sheet.board && <FingerboardDrawing board={sheet.board} unit="in" />}
      {sheet.groups.map((group) => (
        <ProofTable key={group.key} group={group} orderNumber={sheet.orderNumber} />
      ))}
      <SetUp sheet={sheet} />
      <Conceded rows={sheet.concessions} />
      <Papers sheet={sheet} />
    </div>
  );
}

const setUpColumns = [
  { key: 'line', label: 'Line' },
  { key: 'taken', label: 'As left the shop' },
  { key: 'by', label: 'Who and when' },
];

function SetUp({ sheet }: { sheet: AsBuiltSheet }) {
  return (
    <section aria-labelledby="set-up" className="grid gap-5">
      <SectionHeading id="set-up">Set-up sheet</SectionHeading>
      {sheet.setUp.length > 0 ? (
        <Table caption="Set-up, line by line" columns={setUpColumns}>
          {sheet.setUp.map(({ key, label, figures, words, by }) => (
            <Row key={key}>
              <RowHead>{label}</RowHead>
              <Cell note={words}>{figures}</Cell>
              <Cell className="text-soft">{by}</Cell>
            </Row>
          ))}
        </Table>
      ) : (
        <p className="text-soft">What was set up stands above under strings and set-up.</p>
      )}
      {sheet.setUpCautions.map((caution) => (
        <Cautions key={caution.key} cautions={[caution]} />
      ))}
    </section>
  );
}

function Conceded({ rows }: { rows: AsBuiltSheet['concessions'] }) {
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby="conceded" className="grid gap-5">
      <SectionHeading id="conceded">Let pass by the owner</SectionHeading>
      <dl className="grid gap-5">
        {rows.map(({ key, label, signed, measured, reason, by }) => (
          <div key={key} className="max-w-[62ch]">
            <dt className="font-semibold">
              <bdi>{label}</bdi>
            </dt>
            <dd>
              Signed: <bdi>{signed}</bdi>. As it came out: <bdi>{measured}</bdi>.
            </dd>
            <dd className="font-read">{reason}</dd>
            <dd className="text-sm text-soft">{by}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

function Papers({ sheet }: { sheet: AsBuiltSheet }) {
  if (sheet.papers.length === 0) return null;
  return (
    <section aria-labelledby="papers" className="grid gap-5">
      <SectionHeading id="papers">Materials that may need papers</SectionHeading>
      <p>
        <strong className="font-semibold">{sheet.papers.join(', ')}.</strong> {sheet.papersSentence}
      </p>
      <Cautions cautions={sheet.papersCautions} />
    </section>
  );
}
