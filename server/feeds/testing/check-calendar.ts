/**
 * For tests: reads calendar text by the rules of RFC 5545 themselves and shares nothing with what writes it. It returns what
 * is wrong, each with its section; nothing where all is well. It knows the properties of RFC 5545 section 3.8 and RFC 7986.
 */
export function calendarFaults(bytes: Buffer): readonly string[] {
  const faults: string[] = [];
  const text = bytes.toString('utf8');
  if (!Buffer.from(text, 'utf8').equals(bytes)) faults.push('3.1.4: not UTF-8');
  if (!text.endsWith('END:VCALENDAR\r\n')) faults.push('3.4: does not end with END:VCALENDAR and CRLF');
  if (/[^\r]\n|\r[^\n]/.test(text)) faults.push('3.1: a line does not end in CRLF');
  for (const line of splitLines(bytes)) {
    if (line.length > 75) faults.push(`3.1: ${line.length} octets in “${line.toString('utf8')}”`);
    if (!Buffer.from(line.toString('utf8'), 'utf8').equals(line)) faults.push('3.1: a fold splits a character');
    if (line.length === 0) faults.push('3.1: an empty line');
  }
  const lines = unfold(text).map(readLine);
  faults.push(...lines.filter((line) => line.name === '').map((line) => `3.1: “${line.value}” is not a content line`));
  faults.push(...componentFaults(lines));
  return faults;
}

/** A content line, unfolded and taken apart. */
export interface ContentLine {
  readonly name: string;
  readonly parameters: ReadonlyMap<string, string>;
  readonly value: string;
}

/** A component with its own properties and the components inside it. */
export interface CalendarComponent {
  readonly name: string;
  readonly lines: readonly ContentLine[];
  readonly inside: readonly CalendarComponent[];
}

/** Joins folded lines (section 3.1). */
export function unfold(text: string): readonly string[] {
  return text
    .replace(/\r\n[ \t]/g, '')
    .split('\r\n')
    .slice(0, -1);
}

/** Reads the components of a calendar; the outermost is VCALENDAR. */
export function readComponents(text: string): CalendarComponent {
  const stack: { name: string; lines: ContentLine[]; inside: CalendarComponent[] }[] = [
    { name: '', lines: [], inside: [] },
  ];
  for (const line of unfold(text).map(readLine)) {
    const top = stack[stack.length - 1];
    if (line.name === 'BEGIN') {
      stack.push({ name: line.value, lines: [], inside: [] });
    } else if (line.name === 'END') {
      if (top.name !== line.value) throw new Error(`END:${line.value} closes ${top.name}`);
      stack.pop();
      stack[stack.length - 1].inside.push(top);
    } else {
      top.lines.push(line);
    }
  }
  if (stack.length !== 1 || stack[0].inside.length !== 1) throw new Error('not one whole VCALENDAR');
  return stack[0].inside[0];
}

function splitLines(bytes: Buffer): readonly Buffer[] {
  const lines: Buffer[] = [];
  let from = 0;
  for (let at = bytes.indexOf('\r\n'); at >= 0; at = bytes.indexOf('\r\n', from)) {
    lines.push(bytes.subarray(from, at));
    from = at + 2;
  }
  return lines;
}

function readLine(line: string): ContentLine {
  const match = /^([A-Za-z0-9-]+)((?:;[A-Za-z0-9-]+=(?:"[^"]*"|[^";:,]*)(?:,(?:"[^"]*"|[^";:,]*))*)*):([^]*)$/.exec(
    line,
  );
  if (!match) return { name: '', parameters: new Map(), value: line };
  const parameters = [...match[2].matchAll(/;([A-Za-z0-9-]+)=("[^"]*"|[^";:]*)/g)].map(
    ([, name, value]) => [name.toUpperCase(), value.replaceAll('"', '')] as const,
  );
  return { name: match[1].toUpperCase(), parameters: new Map(parameters), value: match[3] };
}

const UTC = /^\d{8}T([01]\d|2[0-3])[0-5]\d[0-5]\dZ$/;
const WALL = /^\d{8}T([01]\d|2[0-3])[0-5]\d[0-5]\d$/;
const DURATION = /^[+-]?P(\d+W|(\d+D)?(T(\d+H)?(\d+M)?(\d+S)?)?)$/;

/** Every backslash begins an escape, comma and semicolon never stand bare, and there are no controls but the tab. */
const TEXT: readonly [RegExp, string] = [
  // eslint-disable-next-line no-control-regex -- controls are what is looked for
  /^(?:\\[\\;,nN]|[^\\;,\u0000-\u0008\u000A-\u001F\u007F])*$/,
  '3.3.11',
];

/** Value shapes by property, each with its section. */
const SHAPES: Readonly<Record<string, readonly [RegExp, string]>> = {
  DTSTAMP: [UTC, '3.8.7.2'],
  'LAST-MODIFIED': [UTC, '3.8.7.3'],
  SEQUENCE: [/^\d+$/, '3.8.7.4'],
  STATUS: [/^(TENTATIVE|CONFIRMED|CANCELLED)$/, '3.8.1.11'],
  TRANSP: [/^(OPAQUE|TRANSPARENT)$/, '3.8.2.7'],
  VERSION: [/^2\.0$/, '3.7.4'],
  CALSCALE: [/^GREGORIAN$/, '3.7.1'],
  TZOFFSETFROM: [/^[+-]\d{4}(\d{2})?$/, '3.8.3.3'],
  TZOFFSETTO: [/^[+-]\d{4}(\d{2})?$/, '3.8.3.4'],
  'REFRESH-INTERVAL': [DURATION, 'RFC 7986 5.7'],
  SUMMARY: TEXT,
  DESCRIPTION: TEXT,
  LOCATION: TEXT,
  NAME: TEXT,
  'X-WR-CALNAME': TEXT,
};

/** What a component must have once, and what it may have at most once (section 3.6). */
const RULES: Readonly<
  Record<string, { readonly must: readonly string[]; readonly once: readonly string[]; readonly section: string }>
> = {
  VCALENDAR: { must: ['PRODID', 'VERSION'], once: ['CALSCALE', 'METHOD', 'REFRESH-INTERVAL'], section: '3.6' },
  VEVENT: {
    must: ['UID', 'DTSTAMP', 'DTSTART'],
    once: [
      'DTEND',
      'DURATION',
      'SUMMARY',
      'DESCRIPTION',
      'LOCATION',
      'SEQUENCE',
      'STATUS',
      'TRANSP',
      'LAST-MODIFIED',
      'CREATED',
      'CLASS',
    ],
    section: '3.6.1',
  },
  VTIMEZONE: { must: ['TZID'], once: ['LAST-MODIFIED', 'TZURL'], section: '3.6.5' },
  STANDARD: { must: ['DTSTART', 'TZOFFSETFROM', 'TZOFFSETTO'], once: ['RRULE'], section: '3.6.5' },
  DAYLIGHT: { must: ['DTSTART', 'TZOFFSETFROM', 'TZOFFSETTO'], once: ['RRULE'], section: '3.6.5' },
};

function componentFaults(lines: readonly ContentLine[]): readonly string[] {
  const faults: string[] = [];
  const inside: string[] = [];
  let componentSeen = false;
  for (const line of lines) {
    if (line.name === 'BEGIN') {
      componentSeen ||= inside.length === 1;
      inside.push(line.value);
    } else if (line.name === 'END') {
      if (inside.pop() !== line.value) faults.push(`3.4: END:${line.value} is out of place`);
    } else {
      if (inside.length === 1 && componentSeen) faults.push(`3.6: ${line.name} stands behind the first component`);
      const shape = SHAPES[line.name];
      if (shape && !shape[0].test(line.value)) faults.push(`${shape[1]}: ${line.name}:${line.value}`);
    }
  }
  if (inside.length > 0) return [...faults, '3.4: a component is not closed'];
  const calendar = readComponents(lines.map((line) => rawLine(line)).join('\r\n') + '\r\n');
  return [...faults, ...ruleFaults(calendar), ...eventFaults(calendar), ...zoneFaults(calendar)];
}

function rawLine(line: ContentLine): string {
  return `${line.name}${[...line.parameters].map(([name, value]) => `;${name}="${value}"`).join('')}:${line.value}`;
}

function ruleFaults(component: CalendarComponent): readonly string[] {
  const rule = RULES[component.name];
  if (!rule) return [`3.6: ${component.name} is not expected`];
  const count = (name: string): number => component.lines.filter((line) => line.name === name).length;
  const faults = [
    ...rule.must
      .filter((name) => count(name) !== 1)
      .map((name) => `${rule.section}: ${count(name)} ${name} in ${component.name}`),
    ...rule.once
      .filter((name) => count(name) > 1)
      .map((name) => `${rule.section}: ${count(name)} ${name} in ${component.name}`),
  ];
  if (component.name === 'VTIMEZONE' && component.inside.length === 0) faults.push('3.6.5: a VTIMEZONE says nothing');
  return [...faults, ...component.inside.flatMap(ruleFaults)];
}

function eventFaults(calendar: CalendarComponent): readonly string[] {
  const events = calendar.inside.filter((one) => one.name === 'VEVENT');
  const uids = events.map((event) => valueOf(event, 'UID'));
  const faults = uids
    .filter((uid, index) => uids.indexOf(uid) !== index)
    .map((uid) => `3.8.4.7: two entries have the UID ${uid}`);
  for (const event of events) {
    const ends = event.lines.filter((line) => line.name === 'DTEND' || line.name === 'DURATION');
    if (ends.length > 1) faults.push('3.6.1: both DTEND and DURATION');
    for (const name of ['DTSTART', 'DTEND']) {
      const line = event.lines.find((one) => one.name === name);
      if (line && !(line.parameters.has('TZID') ? WALL : UTC).test(line.value))
        faults.push(`3.3.5: ${name}:${line.value}`);
    }
    const end = valueOf(event, 'DTEND');
    const sameForm = end.endsWith('Z') === valueOf(event, 'DTSTART').endsWith('Z');
    if (end !== '' && !sameForm) faults.push('3.8.2.2: DTEND is not told like DTSTART');
  }
  return faults;
}

function zoneFaults(calendar: CalendarComponent): readonly string[] {
  const zones = calendar.inside.filter((one) => one.name === 'VTIMEZONE').map((zone) => valueOf(zone, 'TZID'));
  const used = new Set(
    calendar.inside
      .filter((one) => one.name === 'VEVENT')
      .flatMap((event) => event.lines.map((line) => line.parameters.get('TZID')))
      .filter((tzid) => tzid !== undefined),
  );
  return [
    ...[...used].filter((tzid) => !zones.includes(tzid)).map((tzid) => `3.2.19: no VTIMEZONE for ${tzid}`),
    ...zones.filter((tzid, index) => zones.indexOf(tzid) !== index).map((tzid) => `3.6.5: ${tzid} is told twice`),
  ];
}

/** The value of a component's first property of that name; empty where there is none. */
export function valueOf(component: CalendarComponent, name: string): string {
  return component.lines.find((line) => line.name === name)?.value ?? '';
}
