package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.figure.SiteView;
import stillstand.study.SitePreview;
import stillstand.view.StairPicture.Link;

/** Where things lie and what lies under a pointer. */
class StairScaleTest {
    private final StairPicture picture = StairPicture.of(
            SiteView.all(InventedStair.result()).get(0),
            InventedStair.result().seaLevel().curves(),
            SitePreview.of(InventedStair.study(), InventedStair.SITE));
    private final StairScale scale = new StairScale(picture, picture.oldestKa(List.of()), 900, 500, 80);

    @Test
    void placesAndTheirInversesAgree() {
        assertEquals(123.4, scale.ageKaAt(scale.x(123.4)), 1e-9);
        assertEquals(-17.5, scale.metresAt(scale.y(-17.5)), 1e-9);
        assertEquals(scale.present, scale.x(0));
        assertTrue(scale.x(200) < scale.x(100)); // old to the left
        assertTrue(scale.y(50) < scale.y(0)); // up is up
    }

    @Test
    void allLevelsAndTheirHighstandsAreInView() {
        for (StairPicture.Mark level : picture.levels()) {
            assertTrue(scale.y(level.metres()) > scale.top - 1 && scale.y(level.metres()) < scale.bottom, level.name());
        }
        for (Link link : picture.links()) {
            assertTrue(scale.x(link.ageKa()) > scale.left, link.stage());
            assertTrue(scale.y(link.seaMetres()) < scale.bottom, link.stage());
        }
    }

    @Test
    void aHighstandIsFoundWithinReachOnly() {
        double x = scale.x(100);
        double y = scale.y(-9.4);
        assertEquals("5c", scale.standAt(x + 5, y - 5, 9).orElseThrow().stage());
        assertEquals(Optional.empty(), scale.standAt(x, y - 60, 9));
    }

    @Test
    void ofLinesThatCrossTheMoreProbableIsMeant() {
        Link strong = new Link("P2", "5c", 100, -9.4, 40.6, 0.7);
        Link weak = new Link("P2", "5a", 80, -8.5, 40.6, 0.25);
        double nearWall = scale.x(1);
        assertEquals(
                "5c",
                scale.linkAt(nearWall, scale.y(40.2), List.of(weak, strong))
                        .orElseThrow()
                        .stage());
        double middle = (scale.x(80) + scale.present) / 2;
        assertEquals(
                "5a",
                scale.linkAt(middle, scale.y((40.6 - 8.5) / 2), List.of(weak, strong))
                        .orElseThrow()
                        .stage());
    }

    @Test
    void aLevelIsFoundByItsNameAndItsTread() {
        assertEquals(
                "P3",
                scale.levelAt(scale.nameX() + 5, scale.nameY(2)).orElseThrow().name());
        assertEquals(
                "P1",
                scale.levelAt(scale.stepX(0), scale.y(31.5) + 3).orElseThrow().name());
        assertEquals(Optional.empty(), scale.levelAt(scale.stepX(0), scale.y(31.5) + 60));
    }

    @Test
    void ticksAreRoundAndWithinTheAxis() {
        assertEquals(List.of(0.0, 100.0, 200.0, 300.0), StairScale.ticks(-3, 340, 400, 90));
        assertEquals(List.of(-0.2, 0.0, 0.2, 0.4), StairScale.ticks(-0.21, 0.43, 320, 80));
    }
}
