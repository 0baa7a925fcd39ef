import { expect } from 'vitest';
import type { Client } from '../server/harness.ts';

export interface Answer {
  id: string;
  state: string;
  reusedFrom: string | null;
  contentHash: string;
  summary: { classes: number; weight: string; state: string } | null;
  ledger: { state: string; weight: string } | null;
}
export interface Row {
  id: string;
  bare: string;
  position: number;
  loops: number;
  symmetryFactor: string;
  weight: string;
  shape: string;
  onePI: boolean;
  hasTadpole: boolean;
}
export interface PageOf<T> {
  items: T[];
  next: string | null;
  total: number;
}

export async function expand(client: Client, asked: object, more: object = {}): Promise<Answer> {
  const response = await client.post('/api/v1/expansions', { request: asked, ...more });
  expect([200, 202]).toContain(response.status);
  const { id } = (await response.json()) as Answer;
  return (await client.ended(id)) as unknown as Answer;
}

export const page = async (client: Client, id: string, query = ''): Promise<PageOf<Row>> =>
  (await client.get(`/api/v1/expansions/${id}/diagrams?${query}`)).json() as Promise<PageOf<Row>>;

export async function allRows(client: Client, id: string, query: string): Promise<Row[]> {
  const rows: Row[] = [];
  for (let after: string | null = ''; after !== null; ) {
    const answer: PageOf<Row> = await page(client, id, `${query}&after=${after}`);
    rows.push(...answer.items);
    after = answer.next;
  }
  return rows;
}
