import { LinkButton } from '@/components/ui/button';

export default function Forbidden() {
  return (
    <div className="mx-auto max-w-xl px-4 py-16">
      <h1 className="text-2xl">This part is not yours</h1>
      <p className="my-3">Your role does not open this page. If it should, ask the administrator.</p>
      <LinkButton href="/">Go to Today</LinkButton>
    </div>
  );
}
