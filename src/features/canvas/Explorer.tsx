interface Props {
  readonly expansion: string;
  readonly by: string;
  readonly count: number;
}
export default function Explorer(_: Props) {
  return null;
}
