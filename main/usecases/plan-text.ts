import { basename } from 'node:path'
import { fail, problemText, succeed, type Reply } from '../contract/errors'
import { decodeDocument } from '../documents/decode'
import { readDocumentFile } from '../documents/files'

export interface PlanText { readonly name: string; readonly text: string }

/**
 * The text of a plan file, as a window then reads it: it is text, but not yet known to be a plan.
 * A byte order mark stays, so that reading the plan can say that it was dropped.
 *
 * @param path  as the person gave it to the host
 */
export async function readPlanText(path: string): Promise<Reply<PlanText>> {
  const bytes = await readDocumentFile(path)
  if (!bytes.ok) return bytes
  const decoded = decodeDocument(bytes.value)
  if (!decoded.ok) return fail('bad_document', problemText(decoded.problem), [decoded.problem])
  return succeed({ name: basename(path), text: decoded.changes.length > 0 ? `\uFEFF${decoded.text}` : decoded.text })
}
