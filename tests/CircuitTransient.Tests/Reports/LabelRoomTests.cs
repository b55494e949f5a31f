using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public sealed class LabelRoomTests : IDisposable
{
    private readonly PlotFonts fonts = new();

    public void Dispose() => fonts.Dispose();

    [Fact]
    public void The_first_place_that_covers_nothing_is_taken()
    {
        var room = Room();
        room.Avoid([new LineShape(0, 50, 300, 50, PlotStyle.Total)]);

        Assert.Equal(80, room.Place(At(20, 52), At(20, 80), At(20, 150)).Y);
    }

    [Fact]
    public void A_curve_is_kept_clear_of_between_its_points_too()
    {
        var room = Room();
        room.Avoid([new PolylineShape([new(0, 0), new(200, 200)], PlotStyle.Total)]);

        Assert.Equal(20, room.Place(At(95, 100), At(20, 100)).X);
    }

    [Fact]
    public void A_label_keeps_clear_of_labels_and_discs_before_it()
    {
        var room = Room();
        room.Avoid([new DiscShape(40, 78, 4, PlotStyle.Ink)]);
        room.Place(At(20, 50));

        Assert.Equal(110, room.Place(At(25, 52), At(25, 80), At(25, 110)).Y);
        Assert.False(room.IsFree(At(30, 111)));
        Assert.True(room.IsFree(At(30, 150)));
    }

    [Fact]
    public void Where_every_place_covers_something_the_one_that_covers_least_is_taken()
    {
        var room = Room();
        room.Avoid([
            new LineShape(0, 48, 300, 48, PlotStyle.Total), new LineShape(30, 60, 30, 100, PlotStyle.Total)]);

        Assert.Equal(80, room.Place(At(20, 50), At(20, 80)).Y); // across a line, not along one
    }

    [Fact]
    public void Nothing_leaves_the_edges_while_there_is_room_within()
    {
        var room = Room();

        Assert.Equal(250, room.Place(At(280, 100), At(250, 100)).X);
        Assert.False(room.IsFree(At(20, 4)));
    }

    private LabelRoom Room() => new(fonts, 0, 0, 300, 200);

    private static TextShape At(double x, double y) => new(x, y, "12 V", 11, PlotStyle.Ink);
}
