package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class NumberFormTest {
    @ParameterizedTest
    @CsvSource({
        "12.5, 12.5",
        "-3, -3",
        "\u22123.25, -3.25",
        ".5, 0.5",
        "5., 5",
        "1e3, 1000",
        "2.5E-2, 0.025",
        "1e\u22122, 0.01"
    })
    void numbersAreRead(String text, double value) {
        assertEquals(Optional.of(value), NumberForm.parse(text));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "",
                "12d",
                "12f",
                "NaN",
                "Infinity",
                "1e400",
                "-1e400",
                "0x1p3",
                "0x10",
                "1,5",
                "+5",
                "1 000",
                "--1",
                "1e",
                ".",
                "e5",
                "\u0661\u0662"
            })
    void everythingElseIsNone(String text) {
        assertEquals(Optional.empty(), NumberForm.parse(text));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "1,5 | a number with a decimal point",
                "1,250.5 | a number without thousands separators",
                "5% | a number without a percent sign",
                "1e400 | a number that is finite",
                "12d | a number",
                "1e9999999 | a number"
            })
    void whatToWriteInstead(String text, String expected) {
        assertEquals(expected, NumberForm.expectedInsteadOf(text));
    }

    @Test
    void tenMillionCharactersAreNoTrouble() {
        assertEquals(Optional.empty(), NumberForm.parse("1".repeat(10_000_000)));
    }
}
