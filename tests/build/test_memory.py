"""The memory of a started Python, sent as what differs from the binary it came from."""

import io
import struct
import zipfile

import pytest

from webapp.building.memory import PAGE, difference, emptied, initial_memory
from webapp.building.stop import Stop

HEAD = struct.pack('<4I', 0x706E7300, 16, 0, 0)
# a binary with a type section (1) to pass over, then a data section (11) with "data" at 1024
WASM = b'\0asm\1\0\0\0' + b'\x01\x02\xff\xff' + b'\x0b\x0b\x01\x00\x41\x80\x08\x0b\x04data'


def test_the_data_of_a_binary_lies_where_its_segment_says():
    memory = initial_memory(WASM, 2 * PAGE)

    assert memory.index(b'data') == 1024
    assert sum(memory) == sum(b'data')


def test_memory_that_has_not_changed_sends_no_page():
    sent = difference(HEAD + bytes(initial_memory(WASM, 4 * PAGE)), WASM)

    assert struct.unpack_from('<4I', sent) == (16, 4 * PAGE, PAGE, 0)
    assert sent[16:] == HEAD


def test_a_changed_page_is_sent_as_its_difference():
    memory = initial_memory(WASM, 4 * PAGE)
    memory[1024:1028] = b'Data'
    sent = difference(HEAD + bytes(memory), WASM)

    assert struct.unpack_from('<4I', sent)[3] == 1
    assert struct.unpack_from('<I', sent, 32) == (1024 // PAGE,)
    assert sent[36:].rstrip(b'\0') == bytes([ord('d') ^ ord('D')])


def test_a_segment_of_another_kind_stops_the_build():
    with pytest.raises(Stop, match='data segment'):
        initial_memory(WASM.replace(b'\x01\x00\x41', b'\x01\x01\x41'), 2 * PAGE)


def test_an_emptied_member_keeps_its_place_and_every_other_its_contents():
    held = io.BytesIO()
    with zipfile.ZipFile(held, 'w') as archive:
        archive.writestr('gone.pyc', b'gone')
        archive.writestr('kept.pyc', b'kept')
    archive = held.getvalue()

    blank = emptied(archive, {'gone.pyc'})

    assert len(blank) == len(archive)
    assert blank[archive.index(b'gone.pyc') + 8 :].startswith(bytes(4))
    with zipfile.ZipFile(io.BytesIO(blank)) as members:
        assert members.read('kept.pyc') == b'kept'
