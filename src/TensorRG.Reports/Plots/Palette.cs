using ScottPlot;

namespace TensorRG.Reports;

/// <summary>
/// Colours and markers of a series by its place. The colours are those of Okabe and Ito (Color Universal Design, 2008),
/// which readers with any common colour blindness tell apart; yellow is left out because it fades on white. The marker
/// changes with the colour, so that a grey print can be read too.
/// </summary>
internal static class Palette
{
    public static readonly Color Guide = Color.FromHex("#777777");
    public static readonly Color Text = Color.FromHex("#222222");
    public static readonly Color FaintText = Color.FromHex("#555555");
    public static readonly Color MajorGrid = Color.FromHex("#DDDDDD");
    public static readonly Color MinorGrid = Color.FromHex("#F1F1F1");

    private static readonly Color[] s_colors =
    [
        Color.FromHex("#0072B2"), Color.FromHex("#D55E00"), Color.FromHex("#009E73"), Color.FromHex("#CC79A7"),
        Color.FromHex("#E69F00"), Color.FromHex("#56B4E9"), Color.FromHex("#000000"),
    ];

    private static readonly MarkerShape[] s_markers =
    [
        MarkerShape.FilledCircle, MarkerShape.FilledSquare, MarkerShape.FilledTriangleUp, MarkerShape.FilledDiamond,
        MarkerShape.FilledTriangleDown, MarkerShape.OpenCircle, MarkerShape.OpenSquare, MarkerShape.OpenDiamond,
    ];

    public static Color ColorOf(int index) => s_colors[index % s_colors.Length];

    public static MarkerShape MarkerOf(int index) => s_markers[index % s_markers.Length];
}
