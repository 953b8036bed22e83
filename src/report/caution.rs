//! The caution that goes with every printed or exported result.

/// In full, paragraph by paragraph; stands on the first page.
pub const FULL: &[&str] = &[
    "This worksheet is a calculation aid and a record of a calculation. It is not an opinion. A qualified \
     reconstructionist, licensed or accredited where that is required, must decide whether the evidence supports \
     the methods used here and must adopt, change or reject the results.",
    "The results follow from the entries and assumptions listed, and from nothing else. The program cannot know \
     whether a mark was made by this vehicle, whether a reading was taken rightly, or what was left out.",
    "A band covers the listed entries and the stated method error only. What is not listed is not in it. A \
     probability is not a finding of fault, intent or guilt.",
    "Local law, the rules of the court, the accrediting body's rules, the agency's own procedures and the duty to \
     disclose go before this sheet. Keep the evidence unchanged. The sheet is not meant for deciding whether a \
     vehicle is safe to use, for medical questions, or for decisions during an operation.",
];

/// In short, for the foot of every page and for exports.
pub const SHORT: &str = "A calculation aid and record, not an opinion: a licensed or accredited reconstructionist must \
                         adopt, change or reject it; local rules go first. Bands cover the listed entries and stated \
                         method error only. A probability is not a finding of fault.";
