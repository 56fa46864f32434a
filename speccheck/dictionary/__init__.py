"""The dictionary: what a parameter is, what bidders call it, and how a heading is recognised."""

from speccheck.dictionary.concepts import concept_words
from speccheck.dictionary.folding import fold, spellings
from speccheck.dictionary.index import is_ambiguous
from speccheck.dictionary.matching import HeadingMatch, match_heading, specified
from speccheck.dictionary.parameters import LANGUAGES, Example, Parameter, parameters, synonyms

__all__ = [
    "LANGUAGES",
    "Example",
    "HeadingMatch",
    "Parameter",
    "concept_words",
    "fold",
    "is_ambiguous",
    "match_heading",
    "parameters",
    "specified",
    "spellings",
    "synonyms",
]
