'use client';

import { Button } from '@/components/ui/button';

export function PrintButton() {
  return (
    <Button variant="quiet" className="min-h-11" onClick={() => window.print()}>
      Print
    </Button>
  );
}
