/** The office's tables as the queries see them. Times are ISO texts; what is compared with the clock is milliseconds. */
export interface Tables {
  /** `office-device`: under which name the office writes its own entries; a new one after every restore. */
  meta: { name: string; value: string }
  branches: { branch: string; name: string; next_sheet: number; made_at: string }
  accounts: { account: string; branch: string; name: string; role: string; made_at: string; left_at: string | null }
  devices: {
    device: string
    account: string
    label: string
    token_hash: string
    record: string
    made_at: string
    seen_at: string | null
    revoked_at: string | null
  }
  codes: {
    code_hash: string
    account: string
    made_by: string
    expires: number
    used_at: string | null
  }
  surveys: {
    survey: string
    branch: string
    name: string
    client: string | null
    /** Number of facts held. */
    size: number
    made_at: string
    changed_at: string
    erased_at: string | null
    /** Worst verdict and earliest expiry by the last judgement, and the size it was made at. */
    verdict: string | null
    good_until: string | null
    judged_size: number
  }
  /** The highest number of each device in a survey: nothing is missing up to it. */
  marks: { survey: string; device: string; n: number }
  facts: {
    survey: string
    device: string
    n: number
    body: string
    /** Account and device whose token brought it. */
    author: string
    via: string
    at: string
  }
  photos: { survey: string; photo: string; type: string; bytes: number; author: string; at: string }
  signatures: {
    survey: string
    signature: string
    walk: string
    account: string
    name: string
    statement: string
    /** The marks signed for, as JSON. */
    have: string
    at: string
  }
  sheets: {
    survey: string
    number: number
    walk: string
    form: string
    title: string
    verdict: string
    body: string
    facts: string
    team: string
    have: string
    changes: string
    issued_by: string
    issued_at: string
    good_until: string
    replaced_by: number | null
    withdrawn_at: string | null
    withdrawn_why: string | null
  }
  shares: {
    share: string
    survey: string
    number: number
    token_hash: string
    made_by: string
    made_at: string
    expires: number
    revoked_at: string | null
    opened: number
    opened_at: string | null
  }
  givings: {
    survey: string
    giving: string
    number: number
    form: string
    given_to: string
    given_by: string
    given_at: string
    told_at: string | null
    reply: string | null
    replied_at: string | null
  }
  fixes: {
    survey: string
    fix: string
    text: string
    owner: string
    due: string | null
    status: string
    note: string
    changed_by: string
    changed_at: string
  }
  audit: {
    branch: string
    entry: string
    at: string
    account: string
    device: string
    act: string
    survey: string | null
    detail: string
  }
  jobs: {
    job: string
    branch: string
    kind: string
    detail: string
    made_by: string
    made_at: string
    total: number
  }
  job_items: {
    job: string
    survey: string
    state: string
    lease_owner: string | null
    lease_until: number
    result: string | null
  }
}
