import { Fragment } from 'react';
import { Column, Heading, Img, Row, Section } from 'react-email';
import { asSentence, counted } from './count-words';
import { Action, TextLink } from './links';
import { Name, nameInLine } from './name';
import { light, sans } from './palette';
import { Line, SoftLine, Written } from './prose';

export interface DigestEntry {
  dateWords: string;
  authorWords: string;
  textExcerpt: string;
  /** What was measured, a line each. */
  readings: string[];
  /** Content id of an attached picture; mail never points at one on a server. */
  photoCid?: string;
  photoAlt?: string;
  url: string;
}

export interface DigestBuild {
  instrument: string;
  /** Whose it is, when the reader only looks on. */
  ownerName?: string;
  orderNumber: string;
  url: string;
  stageWords: string;
  /** The ready window in words: "between 20 October and 6 November". */
  readyWords?: string;
  entries: DigestEntry[];
  /** New pages that the mail does not show. */
  moreCount: number;
}

export function pageCount({ entries, moreCount }: DigestBuild): number {
  return entries.length + moreCount;
}

/** "your Nightjar baritone", or "the Nightjar baritone of Maren Oyelaran" for somebody who only looks on. */
export function buildInLine({ instrument, ownerName }: DigestBuild): string {
  if (ownerName === undefined) return `your ${nameInLine(instrument)}`;
  return `the ${nameInLine(instrument)} of ${nameInLine(ownerName)}`;
}

/** `lazy`, because React would have a picture that is not preloaded from a server. */
function Photo({ cid, alt }: { cid: string; alt: string }) {
  const size = { height: 'auto', margin: '0 0 12px', maxWidth: '100%', width: '100%' };
  const style = { ...size, borderRadius: '4px', color: light.ink, font: `14px/21px ${sans}` };
  return <Img src={`cid:${cid}`} alt={alt} width="392" loading="lazy" className="ink" style={style} />;
}

function Readings({ lines }: { lines: string[] }) {
  return (
    <SoftLine>
      {lines.map((line, i) => (
        <Fragment key={i}>
          {i > 0 && <br />}
          <Name>{line}</Name>
        </Fragment>
      ))}
    </SoftLine>
  );
}

function Entry({ entry }: { entry: DigestEntry }) {
  const { dateWords, authorWords, textExcerpt, readings, photoCid, photoAlt, url } = entry;
  const side = { font: `600 15px/22px ${sans}`, color: light.ink };
  return (
    <Row style={{ marginTop: '20px' }}>
      <Column
        className="date ink"
        style={{ ...side, paddingRight: '16px', verticalAlign: 'top', whiteSpace: 'nowrap', width: '120px' }}
      >
        {dateWords}
      </Column>
      <Column className="page" style={{ verticalAlign: 'top' }}>
        <SoftLine>
          <Name>{authorWords}</Name>
        </SoftLine>
        {textExcerpt !== '' && <Written>{textExcerpt}</Written>}
        {readings.length > 0 && <Readings lines={readings} />}
        {photoCid !== undefined && <Photo cid={photoCid} alt={photoAlt ?? 'Photo from the bench'} />}
        <SoftLine>
          <TextLink href={url}>{`Open the page of ${dateWords}`}</TextLink>
        </SoftLine>
      </Column>
    </Row>
  );
}

/** One build in a digest: where it stands, then its new pages in the order given. */
export function DigestBuildSection({ build }: { build: DigestBuild }) {
  const { instrument, ownerName, orderNumber, url, stageWords, readyWords, entries, moreCount } = build;
  const unshown = entries.length > 0 ? 'more page' : 'new page';
  const heading = { color: light.ink, font: `600 19px/26px ${sans}`, margin: '0 0 4px' };
  return (
    <Section
      className="line"
      style={{ borderTop: `1px solid ${light.line}`, margin: '8px 0 28px', paddingTop: '20px' }}
    >
      <Heading as="h2" className="ink" style={heading}>
        <Name>{instrument}</Name>
      </Heading>
      <SoftLine>
        {orderNumber}
        {ownerName !== undefined && (
          <>
            {' · built for '}
            <Name>{ownerName}</Name>
          </>
        )}
        {` · ${stageWords}`}
        {readyWords !== undefined && ` · ready ${readyWords}`}
      </SoftLine>
      {entries.map((entry) => (
        <Entry key={entry.url} entry={entry} />
      ))}
      {moreCount > 0 && <Line>{`${asSentence(counted(moreCount, unshown))} in the diary.`}</Line>}
      <Action href={url}>Open the diary</Action>
    </Section>
  );
}
